import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { bad, type Outcome } from '@/lib/errors';

export interface WorkerLimits {
  timeoutSeconds: number;
  memoryMegabytes: number;
  /** Called with counts while the work goes on. */
  onProgress?: (done: number, total: number) => void;
  signal?: AbortSignal;
}

/** What a worker posts: progress any number of times, then one outcome. */
export type WorkerMessage<Value> = { progress: [done: number, total: number] } | { outcome: Outcome<Value> };

/**
 * Runs `build/workers/NAME.mjs` in a thread of its own with limits on time and memory, so that no file can hang or fill the
 * server. Every end is a value: an outcome, or words that say which limit was met. Bytes in `input` are copied to the thread.
 */
export function runInWorker<Value>(name: string, input: unknown, limits: WorkerLimits): Promise<Outcome<Value>> {
  const file = join(/* turbopackIgnore: true */ process.cwd(), 'build', 'workers', `${name}.mjs`);
  if (!existsSync(file)) throw new Error(`The worker ${name} is not built. Run: node scripts/build-workers.mjs`);
  return new Promise((resolve) => {
    const worker = new Worker(file, {
      workerData: input,
      resourceLimits: { maxOldGenerationSizeMb: limits.memoryMegabytes },
      stdout: false,
      stderr: false,
    });
    let settled = false;
    const settle = (outcome: Outcome<Value>) => {
      if (settled) return;
      settled = true;
      clearTimeout(timer);
      limits.signal?.removeEventListener('abort', stop);
      void worker.terminate();
      resolve(outcome);
    };
    const stop = () => settle(bad('Stopped. Nothing was kept.'));
    const timer = setTimeout(
      () =>
        settle(
          bad(
            `This took longer than ${limits.timeoutSeconds} seconds and was stopped. Nothing was kept. Split the file and try again.`,
          ),
        ),
      limits.timeoutSeconds * 1000,
    );
    limits.signal?.addEventListener('abort', stop);
    worker.on('message', (message: WorkerMessage<Value>) => {
      if ('progress' in message) limits.onProgress?.(...message.progress);
      else settle(message.outcome);
    });
    worker.on('error', (error: Error & { code?: string }) => {
      if (error.code === 'ERR_WORKER_OUT_OF_MEMORY') {
        settle(
          bad(
            `This needs more than ${limits.memoryMegabytes} MB of memory and was stopped. Nothing was kept. Split the file and try again.`,
          ),
        );
      } else {
        settle(bad(`The file could not be read (${error.message.slice(0, 200)}). Nothing was kept.`));
      }
    });
    worker.on('exit', () => settle(bad('Reading ended early. Nothing was kept. Try again.')));
  });
}
