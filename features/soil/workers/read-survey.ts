import type { NamedBytes } from '@/lib/archive';
import { serve } from '@/lib/worker/serve';
import type { SurveyTarget } from '../survey/model';
import { readSurvey } from '../survey/read-survey';

await serve(({ archive, fields }: { archive: NamedBytes; fields: SurveyTarget[] }, progress) =>
  readSurvey(archive, fields, progress),
);
