import type { NamedBytes } from '@/lib/archive';
import { good } from '@/lib/errors';
import { serve } from '@/lib/worker/serve';
import { readSoilTests, type SoilReadOptions } from '../readers/read-soil-tests';

await serve(async ({ files, options }: { files: NamedBytes[]; options: SoilReadOptions }) =>
  good(await readSoilTests(files, options)),
);
