import type { NamedBytes } from '@/lib/archive';
import { serve } from '@/lib/worker/serve';
import { readBoundaries } from '../readers/read-boundaries';
import type { ReadOptions } from '../readers/reader';

await serve(({ files, options }: { files: NamedBytes[]; options: ReadOptions }, progress) =>
  readBoundaries(files, options, progress),
);
