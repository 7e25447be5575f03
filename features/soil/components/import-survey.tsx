'use client';

import type { SurveyInspection } from '../survey/model';
import type { FieldShape } from './check-samples';
import { CheckSurvey } from './check-survey';
import { ImportFrame } from './import-frame';
import { type SoilImportActions, useSoilImport } from './soil-import-steps';

/** Choose the survey area's zip → see its map units cut to every field → keep. */
export function ImportSurvey({
  operationId,
  fields,
  actions,
  resume,
}: {
  operationId: string;
  fields: FieldShape[];
  actions: SoilImportActions<SurveyInspection>;
  resume: { uploadId: string; fileName: string } | null;
}) {
  const { checked, ...steps } = useSoilImport('soil-survey', operationId, actions);
  return (
    <ImportFrame
      operationId={operationId}
      steps={steps}
      resume={resume}
      drop={{
        label: 'Choose the soil survey area',
        accept: '.zip',
        multiple: false,
        hint: 'The zip of a county’s SSURGO area from the NRCS, as it was downloaded: map units with their tables. Up to 200 MB. It is cut to the fields; nothing is kept until you say so.',
      }}
    >
      {checked ? (
        <CheckSurvey
          inspection={checked.inspection}
          fields={fields}
          pending={steps.pending}
          onKeep={() => steps.keep()}
          onDiscard={steps.discard}
        />
      ) : null}
    </ImportFrame>
  );
}
