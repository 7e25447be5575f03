'use client';

import {
  createColumnHelper,
  flexRender,
  getCoreRowModel,
  getSortedRowModel,
  type SortingState,
  type Column as TableColumn,
  useReactTable,
} from '@tanstack/react-table';
import Link from 'next/link';
import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useMemo, useState } from 'react';
import { RELEASES, TOLERANCES } from '@/features/placement/engine/model';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { formatCell } from '../cells';
import { COLUMNS } from '../columns';
import type { LineUpVariety, SupplyWord } from '../model';

const helper = createColumnHelper<LineUpVariety>();
const TABLE_COLUMNS = COLUMNS.filter((column) => !column.ofLot && !['code', 'note', 'release'].includes(column.key));
/** Traits that a narrow screen has room for. */
const ON_A_PHONE = new Set(['relativeMaturity', 'height', 'bushType', 'standability', 'tolerances']);

const SUPPLY_KIND: Record<SupplyWord, 'good' | 'attention' | 'error'> = {
  available: 'good',
  limited: 'attention',
  'sold out': 'error',
};

/** The season's varieties with a column for each trait: sort, search, filter; every choice is in the address. */
export function LineUpTable({ varieties, seesSupply }: { varieties: LineUpVariety[]; seesSupply: boolean }) {
  const router = useRouter();
  const path = usePathname();
  const params = useSearchParams();
  const search = params.get('search') ?? '';
  const tolerance = params.get('tolerance') ?? '';
  const release = params.get('release') ?? '';
  const from = params.get('from') ?? '';
  const to = params.get('to') ?? '';
  const [text, setText] = useState(search);
  const [sorting, setSorting] = useState<SortingState>([]);

  function choose(values: Record<string, string>) {
    const next = new URLSearchParams(params);
    for (const [key, value] of Object.entries(values)) {
      if (value) next.set(key, value);
      else next.delete(key);
    }
    router.replace(`${path}?${next}`, { scroll: false });
  }

  const shown = useMemo(
    () =>
      varieties.filter(
        (variety) =>
          variety.code.toLowerCase().includes(text.trim().toLowerCase()) &&
          (!tolerance ||
            (tolerance === 'conventional' ? variety.tolerances.length === 0 : variety.tolerances.includes(tolerance as never))) &&
          (!release || variety.release === release) &&
          (!from || variety.relativeMaturity >= Number(from)) &&
          (!to || variety.relativeMaturity <= Number(to)),
      ),
    [varieties, text, tolerance, release, from, to],
  );
  const columns = useMemo(
    () => [
      helper.accessor('code', { header: 'Variety' }),
      ...TABLE_COLUMNS.map((column) =>
        helper.accessor((variety) => variety[column.key as keyof LineUpVariety], {
          id: column.key,
          header: column.short,
          sortUndefined: 'last',
          meta: { label: column.label },
        }),
      ),
      helper.accessor('supplyWord', { header: 'Supply' }),
      ...(seesSupply ? [helper.accessor('unitsOnHand', { header: 'Units' })] : []),
    ],
    [seesSupply],
  );
  const table = useReactTable({
    data: shown,
    columns: columns as never,
    state: { sorting },
    onSortingChange: setSorting,
    getCoreRowModel: getCoreRowModel(),
    getSortedRowModel: getSortedRowModel(),
  });

  return (
    <div>
      <div className="mb-4 grid grid-cols-2 items-end gap-3 sm:flex sm:flex-wrap [&_input]:max-sm:w-full [&_select]:max-sm:w-full">
        <Filter label="Search">
          <input
            className="min-h-11 border border-ink/40 bg-white px-3 lg:min-h-9"
            type="search"
            value={text}
            onChange={(event) => setText(event.target.value)}
            onBlur={() => choose({ search: text })}
          />
        </Filter>
        <Filter label="Maturity from">
          <input
            className="min-h-11 w-24 border border-ink/40 bg-white px-3 lg:min-h-9"
            inputMode="decimal"
            defaultValue={from}
            onBlur={(event) => choose({ from: event.target.value })}
          />
        </Filter>
        <Filter label="to">
          <input
            className="min-h-11 w-24 border border-ink/40 bg-white px-3 lg:min-h-9"
            inputMode="decimal"
            defaultValue={to}
            onBlur={(event) => choose({ to: event.target.value })}
          />
        </Filter>
        <Filter label="Herbicide tolerance">
          <Choice
            value={tolerance}
            choices={[...TOLERANCES, 'conventional']}
            onChange={(value) => choose({ tolerance: value })}
          />
        </Filter>
        <Filter label="Release">
          <Choice value={release} choices={RELEASES} onChange={(value) => choose({ release: value })} />
        </Filter>
        <p className="col-span-2 text-mute sm:ml-auto">
          {shown.length} of {varieties.length} varieties · ratings 1–9, <b>9 is best</b>, — not rated
        </p>
      </div>
      <VarietyCards varieties={table.getRowModel().rows.map((row) => row.original)} />
      <Table caption="The line-up" className="max-sm:hidden">
        <thead>
          <tr>
            {table.getHeaderGroups()[0]?.headers.map((header) => (
              <Th
                key={header.id}
                numeric={isNumeric(header.column.id)}
                aria-sort={sortWord(header.column as TableColumn<LineUpVariety>)}
                className={phoneClass(header.column.id)}
              >
                <button
                  type="button"
                  title={labelOf(header.column.id)}
                  className="font-semibold hover:underline"
                  onClick={header.column.getToggleSortingHandler()}
                >
                  {flexRender(header.column.columnDef.header, header.getContext())}
                  <span className="sr-only"> {labelOf(header.column.id)}</span>
                  <span aria-hidden="true">{{ asc: ' ↑', desc: ' ↓' }[header.column.getIsSorted() as string] ?? ''}</span>
                </button>
              </Th>
            ))}
          </tr>
        </thead>
        <tbody>
          {table.getRowModel().rows.map(({ original: variety }) => (
            <tr key={variety.id} className="relative hover:bg-bloom-light focus-within:bg-bloom-light">
              <Td className="sticky left-0 z-10 bg-inherit bg-white">
                <Link href={`/line-up/${variety.id}`} className="font-semibold whitespace-nowrap after:absolute after:inset-0">
                  {variety.code}
                </Link>{' '}
                {variety.published ? null : <Tag>draft</Tag>}{' '}
                {variety.release === 'full' ? null : <Tag kind="attention">{variety.release}</Tag>}
              </Td>
              {TABLE_COLUMNS.map((column) => (
                <Td
                  key={column.key}
                  numeric={isNumeric(column.key)}
                  className={`${phoneClass(column.key)} ${column.kind === 'list' ? 'text-[0.9em]' : ''}`}
                >
                  {formatCell(column, variety[column.key as keyof LineUpVariety]).replaceAll(';', ', ') ||
                    (column.key === 'tolerances' ? 'conventional' : '—')}
                </Td>
              ))}
              <Td>
                <Tag kind={SUPPLY_KIND[variety.supplyWord]}>{variety.supplyWord}</Tag>
              </Td>
              {seesSupply ? (
                <Td numeric className="max-sm:hidden">
                  {variety.unitsOnHand?.toLocaleString('en-US') ?? '—'}
                </Td>
              ) : null}
            </tr>
          ))}
        </tbody>
      </Table>
      {shown.length === 0 ? <p className="py-6 text-center text-mute">No variety fits these choices.</p> : null}
    </div>
  );
}

/** The same on a phone: one card a variety, the traits that tell types apart. */
function VarietyCards({ varieties }: { varieties: LineUpVariety[] }) {
  return (
    <ul className="border-ink border-t-2 bg-white sm:hidden">
      {varieties.map((variety) => (
        <li key={variety.id} className="relative border-line border-b px-4 py-3 focus-within:bg-bloom-light">
          <p className="flex items-baseline justify-between gap-3">
            <Link href={`/line-up/${variety.id}`} className="font-display font-bold text-[1.1em] after:absolute after:inset-0">
              {variety.code}
            </Link>
            <span className="font-bold">RM {variety.relativeMaturity.toFixed(1)}</span>
          </p>
          <p className="text-mute">
            {[variety.bushType, variety.height, variety.standability === null ? null : `stands ${variety.standability} of 9`]
              .filter(Boolean)
              .join(' · ')}
          </p>
          <p className="text-mute">{variety.tolerances.join(', ') || 'conventional'}</p>
          <p className="mt-1 flex flex-wrap gap-2">
            <Tag kind={SUPPLY_KIND[variety.supplyWord]}>{variety.supplyWord}</Tag>
            {variety.release === 'full' ? null : <Tag kind="attention">{variety.release} release</Tag>}
            {variety.published ? null : <Tag>draft</Tag>}
          </p>
        </li>
      ))}
    </ul>
  );
}

function Filter({ label, children }: { label: string; children: React.ReactNode }) {
  return (
    // biome-ignore lint/a11y/noLabelWithoutControl: the control is the child.
    <label className="flex flex-col gap-1">
      <span className="font-semibold">{label}</span>
      {children}
    </label>
  );
}

function Choice({ value, choices, onChange }: { value: string; choices: readonly string[]; onChange: (value: string) => void }) {
  return (
    <select
      className="min-h-11 border border-ink/40 bg-white px-3 lg:min-h-9"
      value={value}
      onChange={(event) => onChange(event.target.value)}
    >
      <option value="">any</option>
      {choices.map((choice) => (
        <option key={choice} value={choice}>
          {choice}
        </option>
      ))}
    </select>
  );
}

function isNumeric(key: string): boolean {
  const kind = COLUMNS.find((column) => column.key === key)?.kind;
  return kind === 'maturity' || kind === 'rating' || key === 'unitsOnHand';
}

function labelOf(key: string): string {
  return COLUMNS.find((column) => column.key === key)?.label ?? (key === 'supplyWord' ? 'Supply' : key);
}

function phoneClass(key: string): string {
  return key === 'code' || key === 'supplyWord' || ON_A_PHONE.has(key) ? '' : 'max-sm:hidden';
}

function sortWord(column: TableColumn<LineUpVariety>): 'ascending' | 'descending' | 'none' {
  return { asc: 'ascending' as const, desc: 'descending' as const }[column.getIsSorted() as string] ?? 'none';
}
