import type { NamedBytes } from '@/lib/archive';
import { good } from '@/lib/errors';
import { serve } from '@/lib/worker/serve';
import { type PlacedField, placeSamples } from '../locate';
import { readSoilTests, type SoilReadOptions } from '../readers/read-soil-tests';

interface Input {
  files: NamedBytes[];
  options: SoilReadOptions;
  fields: PlacedField[];
  fieldNames: Record<string, string>;
}

await serve(async ({ files, options, fields, fieldNames }: Input) => {
  const read = await readSoilTests(files, options);
  return good({ read, placed: placeSamples(read.samples, fields, fieldNames) });
});
