import 'server-only';
import { Readable } from 'node:stream';
import type { ReadableStream as NodeReadableStream } from 'node:stream/web';
import busboy from 'busboy';
import { BrokenUpload, type IncomingFile } from './machine';
import { LARGEST_UPLOAD_BYTES, MOST_FILES } from './model';

/**
 * The files of a multipart request, one after another as they stream in; never held whole. Throws BrokenUpload when the body is
 * not a form or ends early.
 */
export async function* incomingFiles(request: Request): AsyncGenerator<IncomingFile> {
  if (!request.body) return;
  const parser = busboy({
    headers: Object.fromEntries(request.headers),
    defParamCharset: 'utf8',
    limits: { files: MOST_FILES + 1, fields: 20, fileSize: LARGEST_UPLOAD_BYTES + 1 },
  });
  const waiting: (IncomingFile | Error | null)[] = [];
  let wake: () => void = () => undefined;
  const push = (item: IncomingFile | Error | null) => {
    waiting.push(item);
    wake();
  };
  parser.on('file', (_field, stream, info) => push({ name: info.filename ?? 'file', stream: guarded(stream) }));
  parser.on('close', () => push(null));
  parser.on('error', (error) => push(error instanceof Error ? error : new Error('The form could not be read.')));
  const source = Readable.fromWeb(request.body as unknown as NodeReadableStream);
  source.on('error', (error) => push(error));
  source.pipe(parser);
  for (;;) {
    if (waiting.length === 0) {
      await new Promise<void>((resolve) => {
        wake = resolve;
      });
    }
    const item = waiting.shift();
    if (item === null || item === undefined) return;
    if (item instanceof Error) throw new BrokenUpload(item.message);
    yield item;
  }
}

/** The same bytes; a stream that breaks off says so as a broken upload. */
async function* guarded(stream: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  try {
    yield* stream;
  } catch (error) {
    throw new BrokenUpload(error instanceof Error ? error.message : 'broken off');
  }
}
