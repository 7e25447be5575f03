'use client';

import type { SoilInspection } from '../import-model';
import { CheckSamples, type FieldShape } from './check-samples';
import { ImportFrame } from './import-frame';
import { type SoilImportActions, useSoilImport } from './soil-import-steps';

/** Choose the laboratory's file → say what its columns are → check every sample on the map → keep. */
export function ImportTests({
  operationId,
  fields,
  actions,
  resume,
}: {
  operationId: string;
  fields: FieldShape[];
  actions: SoilImportActions<SoilInspection>;
  resume: { uploadId: string; fileName: string } | null;
}) {
  const { checked, ...steps } = useSoilImport('soil-tests', operationId, actions);
  return (
    <ImportFrame
      operationId={operationId}
      steps={steps}
      resume={resume}
      drop={{
        label: 'Choose the soil test file',
        accept: '.csv,.tsv,.txt,.xlsx,.xls,.xml,.json,.zip,.shp,.dbf,.prj',
        multiple: true,
        hint: 'A laboratory’s CSV or XLSX, Modus (XML or JSON), or a zipped point shapefile. When results and sample points come apart, choose both at once: they are joined by sample number. Up to 200 MB and 200,000 samples. Nothing is kept until you say so.',
      }}
    >
      {checked ? (
        <CheckSamples
          key={`${checked.uploadId} ${checked.turn}`}
          inspection={checked.inspection}
          fields={fields}
          pending={steps.pending}
          onCheckAgain={(choices) => steps.inspect(checked.uploadId, { choices })}
          onKeep={(choices, keepRepeats) => steps.keep({ choices, keepRepeats })}
          onDiscard={steps.discard}
        />
      ) : null}
    </ImportFrame>
  );
}
