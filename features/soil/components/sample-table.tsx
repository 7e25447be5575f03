'use client';

import { useState } from 'react';
import { formatDate } from '@/lib/dates';
import { formatNumber } from '@/lib/format';
import { Button } from '@/lib/ui/button';
import { SelectField } from '@/lib/ui/form';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import type { InspectedSample, SoilInspection } from '../import-model';

const SHOWN_AT_ONCE = 100;

/** The figures of a sample, in the order of the table. */
const FIGURES = [
  { head: 'pH', digits: 1, value: (sample: InspectedSample) => sample.ph },
  { head: 'Salt pH', digits: 1, value: (sample: InspectedSample) => sample.saltPh },
  { head: 'Buffer pH', digits: 1, value: (sample: InspectedSample) => sample.bufferPh, method: 'bufferMethod' },
  { head: 'OM, %', digits: 1, value: (sample: InspectedSample) => sample.organicMatterPercent },
  { head: 'CEC', digits: 1, value: (sample: InspectedSample) => sample.cec },
  { head: 'P, ppm', digits: 0, value: (sample: InspectedSample) => sample.phosphorusPpm, method: 'phosphorusMethod' },
  { head: 'K, ppm', digits: 0, value: (sample: InspectedSample) => sample.potassiumPpm },
  { head: 'Carbonate, %', digits: 1, value: (sample: InspectedSample) => sample.carbonatePercent },
  { head: 'EC, dS/m', digits: 2, value: (sample: InspectedSample) => sample.electricalConductivity },
  { head: 'Cyst eggs', digits: 0, value: (sample: InspectedSample) => sample.cystEggsPer100cc },
] as const;

/** Every sample with its figures, its field, and what is odd about it. Columns nothing was measured in are left out. */
export function SampleTable({
  inspection: { samples, counts },
  fields,
  selectedId,
  onSelect,
}: {
  inspection: SoilInspection;
  fields: { id: string; name: string }[];
  selectedId: string | null;
  onSelect: (id: string) => void;
}) {
  const [onlyOdd, setOnlyOdd] = useState(false);
  const [shown, setShown] = useState(SHOWN_AT_ONCE);
  const names = new Map(fields.map((field) => [field.id, field.name]));
  const rows = samples.flatMap((sample, index) => (onlyOdd && !isOdd(sample) ? [] : [{ sample, index }]));
  const figures = FIGURES.filter((figure) => samples.some((sample) => figure.value(sample) !== null));
  return (
    <section aria-labelledby="samples-heading" className="flex flex-col gap-3">
      <div className="flex flex-wrap items-end justify-between gap-3">
        <h2 id="samples-heading" className="text-xl">
          Samples
        </h2>
        <SelectField label="Show" value={onlyOdd ? 'odd' : 'all'} onChange={(event) => setOnlyOdd(event.target.value === 'odd')}>
          <option value="all">All samples</option>
          <option value="odd">Only those to look at</option>
        </SelectField>
      </div>
      <Table caption="Samples in the file">
        <thead>
          <tr>
            <Th>Sample</Th>
            <Th>Field</Th>
            <Th className="max-sm:hidden">Sampled</Th>
            <Th className="max-sm:hidden">Depth, in</Th>
            {figures.map((figure) => (
              <Th key={figure.head} numeric>
                {figure.head}
              </Th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.slice(0, shown).map(({ sample, index }) => (
            <tr
              key={index}
              className={selectedId === `sample ${index}` ? 'bg-bloom-light' : isOdd(sample) ? 'bg-straw-light' : ''}
            >
              <Td>
                <button
                  type="button"
                  className="min-h-11 min-w-11 text-left underline underline-offset-4 lg:min-h-0"
                  onClick={() => onSelect(`sample ${index}`)}
                >
                  {sample.id ?? `row ${sample.row}`}
                </button>
                {sample.repeats ? (
                  <span className="ml-2">
                    <Tag kind="attention">{sample.repeats === 'kept' ? 'kept before' : 'twice in the file'}</Tag>
                  </span>
                ) : null}
              </Td>
              <Td className="sm:min-w-36">{whereWords(sample, sample.fieldId ? (names.get(sample.fieldId) ?? null) : null)}</Td>
              <Td className="whitespace-nowrap max-sm:hidden">
                {sample.sampledYearOnly ? sample.sampledOn?.slice(0, 4) : formatDate(sample.sampledOn)}
              </Td>
              <Td className="whitespace-nowrap max-sm:hidden">
                {sample.depthInches ? `${formatNumber(sample.depthInches[0])}–${formatNumber(sample.depthInches[1])}` : '—'}
              </Td>
              {figures.map((figure) => (
                <Td key={figure.head} numeric className="whitespace-nowrap">
                  {formatNumber(figure.value(sample), figure.digits)}
                  {'method' in figure && sample[figure.method] ? (
                    <span className="block text-[0.85em] text-mute">{sample[figure.method]}</span>
                  ) : null}
                </Td>
              ))}
            </tr>
          ))}
        </tbody>
      </Table>
      {rows.length === 0 ? <p className="text-mute">None.</p> : null}
      {rows.length > shown ? (
        <p>
          <Button small onClick={() => setShown(shown + 500)}>
            Show more ({(rows.length - shown).toLocaleString('en-US')} left)
          </Button>
        </p>
      ) : null}
      {counts.all > samples.length ? (
        <p className="text-mute">
          Map and table show the first {samples.length.toLocaleString('en-US')} of {counts.all.toLocaleString('en-US')} samples;
          all are kept.
        </p>
      ) : null}
    </section>
  );
}

function isOdd(sample: InspectedSample): boolean {
  return sample.how === 'none' || sample.repeats !== null;
}

function whereWords(sample: InspectedSample, fieldName: string | null): string {
  if (fieldName) {
    if (sample.how === 'edge') return `${fieldName}, at its edge`;
    return sample.how === 'name' ? `${fieldName}, field average` : fieldName;
  }
  if (sample.longitude === null) return 'no place and no field';
  return sample.nearest ? `in no field; ${distanceWords(sample.nearest.feet)} from ${sample.nearest.name}` : 'in no field';
}

function distanceWords(feet: number): string {
  return feet < 2640 ? `${formatNumber(feet)} ft` : `${formatNumber(feet / 5280, 1)} mi`;
}
