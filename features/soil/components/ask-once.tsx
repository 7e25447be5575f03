'use client';

import { SelectField, TextField } from '@/lib/ui/form';
import { Notice } from '@/lib/ui/page';
import type { SoilChoices, SoilInspection } from '../import-model';
import { BUFFER_METHODS } from '../lime';

const EXTRACTANTS = ['Bray P1', 'Bray P2', 'Mehlich 3', 'Olsen'] as const;

/** What no header says and somebody must: the buffer, the extractant, the unit, the date, the field of rows without a place. */
export function AskOnce({
  inspection: { asks, unmetNames },
  fields,
  choices,
  disabled,
  onChange,
}: {
  inspection: SoilInspection;
  fields: { id: string; name: string }[];
  choices: SoilChoices;
  disabled: boolean;
  onChange: (choices: SoilChoices) => void;
}) {
  if (!Object.values(asks).some(Boolean) && unmetNames.length === 0) return null;
  const set = (values: Partial<SoilChoices>) => onChange({ ...choices, ...values });
  return (
    <Notice kind="info" title="What the file does not say">
      <p className="mb-3">The buffer, extractant and unit are remembered for these headers. What is left open stays unknown.</p>
      <div className="grid gap-4 sm:grid-cols-2 lg:grid-cols-4">
        {asks.bufferMethod ? (
          <SelectField
            label="Buffer of the buffer pH"
            hint="Lime is only worked out when it is known."
            value={choices.bufferMethod ?? ''}
            disabled={disabled}
            onChange={(event) => set({ bufferMethod: event.target.value || undefined })}
          >
            <option value="">Unknown</option>
            {BUFFER_METHODS.map((method) => (
              <option key={method}>{method}</option>
            ))}
          </SelectField>
        ) : null}
        {asks.phosphorusMethod ? (
          <SelectField
            label="Extractant of phosphorus"
            value={choices.phosphorusMethod ?? ''}
            disabled={disabled}
            onChange={(event) => set({ phosphorusMethod: event.target.value || undefined })}
          >
            <option value="">Unknown</option>
            {EXTRACTANTS.map((method) => (
              <option key={method}>{method}</option>
            ))}
          </SelectField>
        ) : null}
        {asks.nutrientUnit ? (
          <SelectField
            label="Unit of P, K, Ca and Mg"
            value={choices.nutrientUnit ?? 'ppm'}
            disabled={disabled}
            onChange={(event) => set({ nutrientUnit: event.target.value === 'lb/ac' ? 'lb/ac' : undefined })}
          >
            <option value="ppm">ppm</option>
            <option value="lb/ac">lb/ac (halved to ppm)</option>
          </SelectField>
        ) : null}
        {asks.sampledOn ? (
          <TextField
            label="Date sampled"
            type="date"
            value={choices.sampledOn ?? ''}
            disabled={disabled}
            onChange={(event) => set({ sampledOn: event.target.value || undefined })}
          />
        ) : null}
        {unmetNames.map(({ key, name, count }) => (
          <SelectField
            key={key}
            label={name ? `Field “${name}”` : 'Rows without a field'}
            hint={`${count} ${count === 1 ? 'row has' : 'rows have'} no place; they become that field’s average.`}
            value={choices.fieldNames?.[key] ?? ''}
            disabled={disabled}
            onChange={(event) => set({ fieldNames: { ...choices.fieldNames, [key]: event.target.value } })}
          >
            <option value="">Leave out</option>
            {fields.map((field) => (
              <option key={field.id} value={field.id}>
                {field.name}
              </option>
            ))}
          </SelectField>
        ))}
      </div>
    </Notice>
  );
}
