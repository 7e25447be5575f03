'use client';

import clsx from 'clsx';
import { Button } from '@/lib/ui/button';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { columnsFor, type PlanColumn, signed } from '../columns';
import { figuresOf, lineName, type PlanLine, type PlanView } from '../model';
import type { PlanState } from '../states';
import { LotCell, NumberCell, VarietyCell } from './cells';
import { StateTag } from './state-tag';

export interface EditHandlers {
  set: (line: PlanLine, set: Record<string, unknown>) => void;
  remove: (line: PlanLine) => void;
}

/** Widths of the cells that are edited, so that lists show their choice and numbers do not sprawl. */
const CELL_WIDTH: Record<string, string> = {
  field: 'whitespace-nowrap',
  variety: 'min-w-52',
  lot: 'min-w-32',
  rowWidth: 'w-20 min-w-16',
  population: 'w-24 min-w-20',
};

interface Props {
  view: PlanView;
  dealershipSide: boolean;
  /** `null`: read only. */
  edit: EditHandlers | null;
}

/** A row a field: the plan on a wide screen. */
export function PlanTable({ view, dealershipSide, edit }: Props) {
  const columns = columnsFor('screen', dealershipSide);
  return (
    <Table caption={`Planting plan ${view.season} of ${view.operationName}`} className="hidden lg:block">
      <thead>
        <tr>
          {columns.map((column) => (
            <Th key={column.id} numeric={column.numeric} className="px-2">
              {column.label}
            </Th>
          ))}
          <Th className="px-2">State</Th>
          {edit ? (
            <Th>
              <span className="sr-only">Take off</span>
            </Th>
          ) : null}
        </tr>
      </thead>
      <tbody>
        {view.lines.map((line) => (
          <tr key={`${line.fieldId} ${line.partName}`} className="hover:bg-hull/60">
            {columns.map((column) => (
              <Td key={column.id} numeric={column.numeric} className={clsx('px-2 align-middle', CELL_WIDTH[column.id])}>
                <Cell column={column} line={line} view={view} edit={edit} place="table" />
              </Td>
            ))}
            <Td className="px-2 align-middle">
              <LineState line={line} state={view.state} />
            </Td>
            {edit ? (
              <Td className="px-1 align-middle">
                <TakeOff line={line} edit={edit} />
              </Td>
            ) : null}
          </tr>
        ))}
      </tbody>
      <tfoot>
        <tr>
          {columns.map((column) => (
            <Td key={column.id} numeric={column.numeric} className="border-b-0 border-t-2 border-t-ink px-2 font-semibold">
              {column.total?.(view.totals) ?? ''}
            </Td>
          ))}
          <Td className="border-b-0 border-t-2 border-t-ink" />
          {edit ? <Td className="border-b-0 border-t-2 border-t-ink" /> : null}
        </tr>
      </tfoot>
    </Table>
  );
}

/** The same rows as cards, for a phone. */
export function PlanCards({ view, dealershipSide, edit }: Props) {
  const small = columnsFor('screen', dealershipSide).filter(
    (column) => !['field', 'variety', 'lot', 'acres', 'rowWidth', 'population', 'expected'].includes(column.id),
  );
  const byId = new Map(columnsFor('screen', dealershipSide).map((column) => [column.id, column]));
  const cell = (id: string, line: PlanLine) => (
    <Cell column={byId.get(id) as PlanColumn} line={line} view={view} edit={edit} place="card" />
  );
  return (
    <ul className="flex flex-col gap-3 lg:hidden" aria-label="Fields on the plan">
      {view.lines.map((line) => {
        const figures = figuresOf(line);
        return (
          <li key={`${line.fieldId} ${line.partName}`} className="border border-line bg-paper p-4">
            <div className="flex items-baseline justify-between gap-3">
              <h2 className="text-lg">{lineName(line)}</h2>
              <span className="text-mute whitespace-nowrap">{byId.get('acres')?.text(line, figures)} ac</span>
            </div>
            <div className="mt-2 flex items-center justify-between gap-3">
              <div className="min-w-0 flex-1">{cell('variety', line)}</div>
              <strong className="font-display text-xl whitespace-nowrap">
                {figures.expected === null ? '' : `${byId.get('expected')?.text(line, figures)} bu/ac`}
              </strong>
            </div>
            {line.variety ? (
              <>
                <div className="mt-3 grid grid-cols-3 gap-2">
                  <LabelledCell label="Lot">{cell('lot', line)}</LabelledCell>
                  <LabelledCell label="Rows, in">{cell('rowWidth', line)}</LabelledCell>
                  <LabelledCell label="Seeds/ac, 000">{cell('population', line)}</LabelledCell>
                </div>
                <dl className="mt-3 grid grid-cols-2 gap-x-4 gap-y-1">
                  {small.map((column) => (
                    <div
                      key={column.id}
                      className={clsx(
                        'flex items-center justify-between gap-2 border-b border-line py-1',
                        column.id === 'runnerUp' && 'col-span-2',
                      )}
                    >
                      <dt className="text-mute">{column.label}</dt>
                      <dd>
                        {column.id === 'runnerUp' ? (
                          <Cell column={column} line={line} view={view} edit={edit} place="card" />
                        ) : (
                          column.text(line, figures) || '—'
                        )}
                      </dd>
                    </div>
                  ))}
                </dl>
              </>
            ) : null}
            <div className="mt-3 flex items-center justify-between gap-2">
              <LineState line={line} state={view.state} />
              {edit ? <TakeOff line={line} edit={edit} words /> : null}
            </div>
          </li>
        );
      })}
    </ul>
  );
}

function LabelledCell({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    <div>
      <div className="text-mute text-[0.88em]">{label}</div>
      {children}
    </div>
  );
}

function Cell({
  column,
  line,
  view,
  edit,
  place,
}: {
  column: PlanColumn;
  line: PlanLine;
  view: PlanView;
  edit: EditHandlers | null;
  place: string;
}) {
  const figures = figuresOf(line);
  const onSet = (set: Record<string, unknown>) => edit?.set(line, set);
  if (column.id === 'field') return <span className="font-semibold">{column.text(line, figures)}</span>;
  if (column.id === 'expected') return <strong>{column.text(line, figures)}</strong>;
  if (column.id === 'poundsPerAcre' && figures.largeSeed) {
    return (
      <span title="Large seed: mind the plates (common practice)">
        {column.text(line, figures)} <span className="block text-straw-deep text-[0.85em]">large seed</span>
      </span>
    );
  }
  if (column.id === 'runnerUp') return <RunnerUp line={line} view={view} edit={edit} />;
  if (edit && column.id === 'variety') {
    return <VarietyCell line={line} onSet={onSet} choices={view.choices[line.fieldId] ?? []} place={place} />;
  }
  if (column.id === 'variety' && line.variety) {
    return (
      <span className="whitespace-nowrap">
        <strong>{line.variety.code}</strong>{' '}
        <span className="text-mute text-[0.92em]">RM {line.variety.relativeMaturity.toFixed(1)}</span>
      </span>
    );
  }
  if (edit && column.id === 'lot') {
    return <LotCell line={line} onSet={onSet} lots={line.variety ? (view.lots[line.variety.id] ?? []) : []} place={place} />;
  }
  if (edit && column.id === 'rowWidth') {
    return (
      <NumberCell
        line={line}
        onSet={onSet}
        place={place}
        name="rowWidthInches"
        label="Row width, in"
        value={line.rowWidthInches}
      />
    );
  }
  if (edit && column.id === 'population' && line.variety) {
    return (
      <NumberCell
        line={line}
        onSet={onSet}
        place={place}
        name="populationSeedsPerAcre"
        label="Seeds per acre, thousands"
        value={line.populationSeedsPerAcre}
        scale={1000}
      />
    );
  }
  return <>{column.text(line, figures)}</>;
}

/** The runner-up, one press away; for a field without a pick, why. */
function RunnerUp({ line, view, edit }: { line: PlanLine; view: PlanView; edit: EditHandlers | null }) {
  const first = (view.choices[line.fieldId] ?? []).find((choice) => choice.expected !== null);
  if (!line.variety) {
    return (
      <span className="text-mute text-[0.92em]">
        {edit && first ? (
          <Button small kind="quiet" onClick={() => edit.set(line, { varietyId: first.varietyId })}>
            Put {first.code}
          </Button>
        ) : (
          (line.caution ?? 'no pick put')
        )}
      </span>
    );
  }
  if (!line.runnerUp) return <span className="text-mute text-[0.92em]">{line.caution ?? ''}</span>;
  const other = (view.choices[line.fieldId] ?? []).find((choice) => choice.code === line.runnerUp?.code);
  const words = `${line.runnerUp.code} ${signed(line.runnerUp.differenceBushels)}`;
  if (!edit || !other) return <span className="text-mute text-[0.92em] whitespace-nowrap">{words}</span>;
  return (
    <Button
      small
      kind="quiet"
      className="px-0! font-normal! text-mute"
      aria-label={`Take ${line.runnerUp.code} on ${lineName(line)} instead, ${signed(line.runnerUp.differenceBushels)} bu/ac`}
      onClick={() => edit.set(line, { varietyId: other.varietyId })}
    >
      {words}
    </Button>
  );
}

function LineState({ line, state }: { line: PlanLine; state: PlanState }) {
  if (line.plantedOn) return <Tag kind="good">planted</Tag>;
  if (line.variety && line.caution?.startsWith('stopped')) return <Tag kind="error">stopped</Tag>;
  if (!line.variety) return <Tag>no pick</Tag>;
  return <StateTag state={state} />;
}

function TakeOff({ line, edit, words = false }: { line: PlanLine; edit: EditHandlers; words?: boolean }) {
  if (!line.id || !line.variety) return null;
  return (
    <Button small kind="quiet" aria-label={`Take ${lineName(line)} off the plan`} onClick={() => edit.remove(line)}>
      {words ? 'Take off' : '✕'}
    </Button>
  );
}
