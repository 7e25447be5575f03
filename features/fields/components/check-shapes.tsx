'use client';

import { useMemo, useState } from 'react';
import { formatAcres } from '@/lib/format';
import { MapView } from '@/lib/map/map-view';
import { Button } from '@/lib/ui/button';
import { SelectField } from '@/lib/ui/form';
import { Notice } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { type BoundaryInspection, type InspectedShape, isKeepable, proposalFor } from '../import-model';

export interface ShapeChoice {
  index: number;
  name: string;
  farm: string;
  /** 'skip', 'keep', or the id of the field it replaces. */
  decision: string;
  replaces: string | null;
}

const COLORS = { keep: '#dbe8d8', skip: '#efe8d6', attention: '#f5e6c4' };
const INPUT = 'min-h-11 w-full min-w-36 border border-ink/40 bg-white px-2 lg:min-h-8';

/** Every shape of the file on a map and in a table: what is wrong with it, and whether to keep, skip or replace. */
export function CheckShapes({
  inspection,
  knownFields,
  farmNames,
  crsChoices,
  pending,
  onOptions,
  onKeep,
  onDiscard,
}: {
  inspection: BoundaryInspection;
  knownFields: { id: string; name: string }[];
  farmNames: string[];
  crsChoices: readonly { code: string; label: string }[];
  pending: boolean;
  onOptions: (options: { crs?: string; nameColumn?: string }) => void;
  onKeep: (shapes: ShapeChoice[]) => void;
  onDiscard: () => void;
}) {
  const { shapes, columns, nameColumn, notes, unknownCrs, format } = inspection;
  const [choices, setChoices] = useState<ShapeChoice[]>(() => shapes.map(firstChoice));
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const kept = choices.filter((one) => one.decision !== 'skip');
  const unnamed = kept.filter((one) => !one.name.trim());
  const acres = kept.reduce((sum, one) => sum + (shapes[one.index]?.areaAcres ?? 0), 0);
  const change = (index: number, values: Partial<ShapeChoice>) =>
    setChoices((all) => all.map((one) => (one.index === index ? { ...one, ...values } : one)));

  const polygons = useMemo(
    () =>
      shapes.flatMap((shape) => {
        if (!shape.outline || shape.outline.coordinates.length === 0) return [];
        const decision = choices[shape.index]?.decision;
        return [
          {
            id: String(shape.index),
            geometry: shape.outline,
            fill: decision === 'skip' ? COLORS.skip : shape.problems.length > 0 ? COLORS.attention : COLORS.keep,
            fillOpacity: 0.85,
            label: shapes.length <= 60 && decision !== 'skip' ? (choices[shape.index]?.name ?? '') : undefined,
            sublabel: shapes.length <= 60 && decision !== 'skip' ? `${formatAcres(shape.areaAcres)} ac` : undefined,
          },
        ];
      }),
    [shapes, choices],
  );

  return (
    <div className="flex flex-col gap-4">
      {unknownCrs ? (
        <AskCrs unknownCrs={unknownCrs} choices={crsChoices} pending={pending} onChoose={(crs) => onOptions({ crs })} />
      ) : null}
      {notes.map((note) => (
        <Notice key={note} kind="attention">
          {note}
        </Notice>
      ))}
      <div className="flex flex-wrap items-end gap-4">
        <p className="grow">
          <b>{shapes.length}</b> {shapes.length === 1 ? 'shape' : 'shapes'} in the {format}; <b>{kept.length}</b> to keep,{' '}
          {formatAcres(acres)} ac.
        </p>
        {columns.length > 0 ? (
          <SelectField
            label="Names come from the column"
            value={nameColumn ?? ''}
            onChange={(event) => onOptions({ nameColumn: event.target.value })}
            disabled={pending}
            className="min-w-56"
          >
            <option value="">(no column)</option>
            {columns.map((column) => (
              <option key={column.name} value={column.name}>
                {column.name}
                {column.samples.length > 0 ? `: ${column.samples.join(', ')}` : ''}
              </option>
            ))}
          </SelectField>
        ) : null}
      </div>
      <MapView
        ariaLabel="Map of the shapes in the file"
        polygons={polygons}
        selectedId={selectedId}
        onSelect={setSelectedId}
        fitKey={String(shapes.length)}
        className="h-80 border border-line lg:h-[26rem]"
      />
      <Table caption="Shapes in the file" stacked>
        <thead>
          <tr>
            <Th>What to do</Th>
            <Th>Name</Th>
            <Th>Farm</Th>
            <Th numeric>Acres</Th>
            <Th>What is wrong</Th>
          </tr>
        </thead>
        <tbody>
          {shapes.slice(0, 500).map((shape) => (
            <ShapeRow
              key={shape.index}
              shape={shape}
              choice={choices[shape.index] as ShapeChoice}
              knownFields={knownFields}
              selected={selectedId === String(shape.index)}
              onChange={(values) => change(shape.index, values)}
              onSelect={() => setSelectedId(String(shape.index))}
            />
          ))}
        </tbody>
      </Table>
      {shapes.length > 500 ? (
        <p className="text-mute">
          The table shows the first 500 of {shapes.length.toLocaleString('en-US')} shapes; the others are kept as proposed.
        </p>
      ) : null}
      <datalist id="farm-names">
        {farmNames.map((name) => (
          <option key={name} value={name} />
        ))}
      </datalist>
      {unnamed.length > 0 ? (
        <Notice kind="attention">
          {unnamed.length} {unnamed.length === 1 ? 'shape has' : 'shapes have'} no name. Write one, choose another column, or skip
          it.
        </Notice>
      ) : null}
      <div className="sticky bottom-0 flex flex-wrap gap-2 border-line border-t bg-hull py-3">
        <Button
          kind="action"
          pending={pending}
          disabled={kept.length === 0 || unnamed.length > 0 || unknownCrs !== null}
          onClick={() => onKeep(kept)}
        >
          Keep {kept.length} {kept.length === 1 ? 'field' : 'fields'}
        </Button>
        <Button pending={pending} onClick={onDiscard}>
          Keep nothing
        </Button>
      </div>
    </div>
  );
}

function firstChoice(shape: InspectedShape): ShapeChoice {
  return {
    index: shape.index,
    name: shape.name ?? `Field ${shape.index + 1}`,
    farm: shape.farm ?? '',
    decision: proposalFor(shape),
    replaces: null,
  };
}

function ShapeRow({
  shape,
  choice,
  knownFields,
  selected,
  onChange,
  onSelect,
}: {
  shape: InspectedShape;
  choice: ShapeChoice;
  knownFields: { id: string; name: string }[];
  selected: boolean;
  onChange: (values: Partial<ShapeChoice>) => void;
  onSelect: () => void;
}) {
  const called = choice.name || `shape ${shape.index + 1}`;
  const problems = [
    ...shape.problems,
    ...shape.overlaps.map((one) =>
      one.same
        ? `The same ground as ${one.fieldName}, which is kept already.`
        : `Overlaps ${one.fieldName} by ${one.acres.toFixed(1)} ac.`,
    ),
  ];
  return (
    <tr className={selected ? 'bg-bloom-light' : choice.decision === 'skip' ? 'bg-hull/60' : ''} onFocus={onSelect}>
      <Td>
        <select
          aria-label={`What to do with ${called}`}
          className={INPUT}
          value={choice.decision}
          disabled={!isKeepable(shape)}
          onChange={(event) => {
            const decision = event.target.value;
            onChange({ decision, replaces: decision === 'keep' || decision === 'skip' ? null : decision });
          }}
        >
          <option value="keep">Keep as a new field</option>
          <option value="skip">Skip</option>
          {knownFields.map((field) => (
            <option key={field.id} value={field.id}>
              Replace {field.name}
            </option>
          ))}
        </select>
      </Td>
      <Td>
        <input
          aria-label={`Name of shape ${shape.index + 1}`}
          className={INPUT}
          value={choice.name}
          onChange={(event) => onChange({ name: event.target.value })}
        />
      </Td>
      <Td>
        <input
          aria-label={`Farm of ${called}`}
          className={INPUT}
          list="farm-names"
          value={choice.farm}
          onChange={(event) => onChange({ farm: event.target.value })}
        />
      </Td>
      <Td numeric>{isKeepable(shape) ? formatAcres(shape.areaAcres, 2) : '—'}</Td>
      <Td className="min-w-64">
        {problems.length === 0 ? (
          <span className="text-mute">Nothing</span>
        ) : (
          <ul>
            {problems.map((problem) => (
              <li key={problem}>{problem}</li>
            ))}
          </ul>
        )}
      </Td>
    </tr>
  );
}

function AskCrs({
  unknownCrs,
  choices,
  pending,
  onChoose,
}: {
  unknownCrs: { guess: string | null; example: [number, number] };
  choices: readonly { code: string; label: string }[];
  pending: boolean;
  onChoose: (crs: string) => void;
}) {
  const [crs, setCrs] = useState(unknownCrs.guess ?? '');
  const guessed = choices.find((one) => one.code === unknownCrs.guess);
  return (
    <Notice kind="attention" title="The file does not say its coordinate system (there is no .prj).">
      <p className="mb-3">
        Its first corner reads {unknownCrs.example.map((one) => one.toPrecision(9)).join(', ')}.{' '}
        {guessed
          ? `The map shows it as ${guessed.label}. If the fields lie where they should, confirm it; else choose another.`
          : 'Choose the one it was exported in.'}
      </p>
      <div className="flex flex-wrap items-end gap-3">
        <SelectField label="Coordinate system" value={crs} onChange={(event) => setCrs(event.target.value)} className="min-w-72">
          <option value="">Choose…</option>
          {choices.map((one) => (
            <option key={one.code} value={one.code}>
              {one.label}
            </option>
          ))}
        </SelectField>
        <Button kind="action" pending={pending} disabled={!crs} onClick={() => onChoose(crs)}>
          Use this one
        </Button>
      </div>
    </Notice>
  );
}
