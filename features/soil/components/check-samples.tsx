'use client';

import type { MultiPolygon, Polygon } from 'geojson';
import { useState } from 'react';
import { Button } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { CheckField } from '@/lib/ui/form';
import { Caution, Notice, Panel } from '@/lib/ui/page';
import type { SoilChoices, SoilInspection } from '../import-model';
import { AskOnce } from './ask-once';
import { MatchColumns } from './match-columns';
import { SampleMap } from './sample-map';
import { SampleTable } from './sample-table';

export interface FieldShape {
  id: string;
  name: string;
  boundary: Polygon | MultiPolygon;
}

/** What was understood of the file: its columns, its samples on the map and in a table, what is wrong, and what to do. */
export function CheckSamples({
  inspection,
  fields,
  pending,
  onCheckAgain,
  onKeep,
  onDiscard,
}: {
  inspection: SoilInspection;
  fields: FieldShape[];
  pending: boolean;
  onCheckAgain: (choices: SoilChoices) => void;
  onKeep: (choices: SoilChoices, keepRepeats: boolean) => void;
  onDiscard: () => void;
}) {
  const { counts, problems, columns } = inspection;
  const [choices, setChoices] = useState<SoilChoices>(inspection.choices);
  const [keepRepeats, setKeepRepeats] = useState(false);
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const [showColumns, setShowColumns] = useState(counts.all === 0);
  const changed = JSON.stringify(choices) !== JSON.stringify(inspection.choices);
  const matched = columns.filter((column) => column.meaning !== null).length;
  const toKeep = counts.all - counts.unplaced - (keepRepeats ? 0 : counts.repeated);

  /** Once one column is put right, all are said, so that the guess does not move the others. */
  function setColumn(header: string, meaning: string) {
    const now = Object.fromEntries(columns.map((column) => [column.header, column.meaning ?? '']));
    setChoices((before) => ({ ...before, columns: { ...now, ...before.columns, [header]: meaning } }));
  }

  return (
    <div className="flex flex-col gap-5">
      <Understood inspection={inspection} />
      {problems.length > 0 ? (
        <Notice kind="attention" title={`${problems.length} ${problems.length === 1 ? 'thing' : 'things'} to look at`}>
          <ul className="max-h-72 overflow-y-auto">
            {problems.slice(0, 200).map((problem) => (
              <li key={problem.message} className="break-words py-0.5">
                {problem.message}
              </li>
            ))}
          </ul>
          {problems.length > 200 ? <p>The first 200 are shown.</p> : null}
        </Notice>
      ) : null}
      <AskOnce inspection={inspection} fields={fields} choices={choices} disabled={pending} onChange={setChoices} />
      <section aria-labelledby="columns-heading" className="flex flex-col gap-3">
        <div className="flex flex-wrap items-center justify-between gap-3">
          <h2 id="columns-heading" className="text-xl">
            Columns: {matched} of {columns.length} used
          </h2>
          <Button small aria-expanded={showColumns} onClick={() => setShowColumns(!showColumns)}>
            {showColumns ? 'Hide the columns' : 'See and correct the columns'}
          </Button>
        </div>
        {inspection.remembered ? <p className="text-mute">Matched as it was done before for these headers.</p> : null}
        {showColumns ? (
          <MatchColumns columns={columns} chosen={choices.columns ?? {}} disabled={pending} onChange={setColumn} />
        ) : null}
      </section>
      {counts.all > 0 ? (
        <>
          <SampleMap samples={inspection.samples} fields={fields} selectedId={selectedId} onSelect={setSelectedId} />
          <SampleTable inspection={inspection} fields={fields} selectedId={selectedId} onSelect={setSelectedId} />
        </>
      ) : null}
      {counts.repeated > 0 ? (
        <CheckField
          label={`Keep the ${counts.repeated} ${counts.repeated === 1 ? 'repeat' : 'repeats'} too`}
          hint="Same sample number, date and field as one that is kept already or stands above it in the file."
          checked={keepRepeats}
          onChange={(event) => setKeepRepeats(event.target.checked)}
        />
      ) : null}
      <Caution>{CAUTIONS.soil}</Caution>
      <div className="sticky bottom-0 z-10 flex flex-wrap gap-2 border-line border-t bg-hull py-3">
        {changed ? (
          <Button kind="action" pending={pending} onClick={() => onCheckAgain(choices)}>
            Check again with these choices
          </Button>
        ) : (
          <Button kind="action" pending={pending} disabled={toKeep <= 0} onClick={() => onKeep(choices, keepRepeats)}>
            Keep {toKeep.toLocaleString('en-US')} {toKeep === 1 ? 'sample' : 'samples'}
          </Button>
        )}
        <Button pending={pending} onClick={onDiscard}>
          Keep nothing
        </Button>
      </div>
    </div>
  );
}

function Understood({ inspection: { counts, format, laboratory, notes } }: { inspection: SoilInspection }) {
  const parts = [
    counts.inFields > 0
      ? `${counts.inFields.toLocaleString('en-US')} lie in a field${counts.edge > 0 ? ` (${counts.edge} at its edge, within 30 ft)` : ''}`
      : null,
    counts.byName > 0 ? `${counts.byName} go to a field by its name` : null,
    counts.stray > 0 ? `${counts.stray} lie in no field` : null,
    counts.unplaced > 0 ? `${counts.unplaced} have neither a place nor a field` : null,
    counts.repeated > 0 ? `${counts.repeated} repeat another` : null,
  ].filter((part) => part !== null);
  return (
    <Panel aria-label="What was understood">
      <p>
        <b>{counts.all.toLocaleString('en-US')}</b> {counts.all === 1 ? 'sample' : 'samples'} read from {format}
        {laboratory ? `, ${laboratory}` : ''}
        {parts.length > 0 ? `: ${parts.join(', ')}` : ''}.
      </p>
      {counts.stray > 0 ? (
        <p className="mt-1 text-mute">
          Samples in no field are kept and stay on the map, but score nothing until a field holds them.
        </p>
      ) : null}
      {notes.length > 0 ? (
        <ul className="mt-2 list-disc pl-5 text-mute">
          {notes.slice(0, 12).map((note) => (
            <li key={note} className="break-words">
              {note}
            </li>
          ))}
          {notes.length > 12 ? <li>And {notes.length - 12} more.</li> : null}
        </ul>
      ) : null}
    </Panel>
  );
}
