import { parentPort, workerData } from 'node:worker_threads';
import { bad, type Outcome } from '@/lib/errors';
import type { WorkerMessage } from './run';

/** The other end of runInWorker: hands the input to the work and posts its outcome; a throw becomes words, never silence. */
export async function serve<Input, Value>(
  work: (input: Input, progress: (done: number, total: number) => void) => Promise<Outcome<Value>>,
): Promise<void> {
  const post = (message: WorkerMessage<Value>) => parentPort?.postMessage(message);
  try {
    post({ outcome: await work(workerData as Input, (done, total) => post({ progress: [done, total] })) });
  } catch (error) {
    post({
      outcome: bad(
        `The file could not be read (${error instanceof Error ? error.message.slice(0, 200) : 'unknown fault'}). Nothing was kept.`,
      ),
    });
  }
}
