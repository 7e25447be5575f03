'use client';

import clsx from 'clsx';
import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import { formatAcres, formatBand, formatBushels } from '@/lib/format';
import { MapView } from '@/lib/map/map-view';
import type { TileLayer } from '@/lib/map/style';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { type FieldLine, holdWords, missingWords } from '../view';
import { pickColours } from './factor-colours';
import { FieldCards } from './field-cards';

type SortKey = 'name' | 'areaAcres' | 'pickCode' | 'expected' | 'fixFirstBushels' | 'missing';

function sortValue(line: FieldLine, key: SortKey): string | number {
  if (key === 'missing') return line.missing.length;
  if (key === 'name') return `${line.farmName ?? ''} ${line.name}`;
  return line[key] ?? (key === 'pickCode' ? '~' : Number.NEGATIVE_INFINITY);
}

/** Every field of an operation, map and table side by side; on a phone the list first and the map as a tab. */
export function FieldsBoard({ lines, tiles }: { lines: FieldLine[]; tiles: TileLayer | null }) {
  const router = useRouter();
  const [sort, setSort] = useState<{ key: SortKey; down: boolean }>({ key: 'name', down: false });
  const [hovered, setHovered] = useState<string | null>(null);
  const [tab, setTab] = useState<'list' | 'map'>('list');
  const colours = useMemo(() => pickColours(lines.flatMap((line) => line.pickCode ?? [])), [lines]);
  const sorted = useMemo(() => {
    const direction = sort.down ? -1 : 1;
    return [...lines].sort((one, other) => {
      const a = sortValue(one, sort.key);
      const b = sortValue(other, sort.key);
      return (a < b ? -1 : a > b ? 1 : 0) * direction || (one.name < other.name ? -1 : 1);
    });
  }, [lines, sort]);
  const polygons = useMemo(
    () =>
      lines.map((line) => ({
        id: line.id,
        geometry: line.geometry,
        fill: line.pickCode ? colours.get(line.pickCode) : '#efe8d6',
        label: line.name,
        sublabel: line.pickCode ? `${line.pickCode} · ${formatBushels(line.expected)}` : `${formatAcres(line.areaAcres)} ac`,
      })),
    [lines, colours],
  );
  const head = (key: SortKey, words: string, numeric = false) => (
    <Th numeric={numeric} aria-sort={sort.key === key ? (sort.down ? 'descending' : 'ascending') : 'none'}>
      <button
        type="button"
        className="font-semibold underline-offset-4 hover:underline"
        onClick={() => setSort((before) => ({ key, down: before.key === key ? !before.down : numeric }))}
      >
        {words}
        <span aria-hidden="true">{sort.key === key ? (sort.down ? ' ↓' : ' ↑') : ''}</span>
      </button>
    </Th>
  );

  return (
    <div className="grid gap-5 xl:grid-cols-[minmax(0,4fr)_minmax(0,6fr)]">
      <nav className="flex border border-line xl:hidden" aria-label="List or map">
        {(['list', 'map'] as const).map((one) => (
          <button
            key={one}
            type="button"
            aria-current={tab === one}
            onClick={() => setTab(one)}
            className={clsx('min-h-11 grow font-semibold', tab === one ? 'border-b-4 border-b-bloom bg-paper' : 'bg-hull')}
          >
            {one === 'list' ? 'List' : 'Map'}
          </button>
        ))}
      </nav>
      <MapView
        ariaLabel="Map of the fields, coloured by pick. The table names the same picks."
        polygons={polygons}
        selectedId={hovered}
        onSelect={(id) => router.push(`/fields/${id}`)}
        fitKey={`${lines.length} ${tab}`}
        tiles={tiles}
        className={clsx(
          'h-[65dvh] border border-line xl:sticky xl:top-20 xl:block xl:h-[calc(100dvh-11rem)]',
          tab === 'map' ? 'block' : 'hidden',
        )}
      />
      <div className={clsx('xl:block', tab === 'list' ? 'block' : 'hidden')}>
        <FieldCards lines={sorted} colours={colours} />
        <Table caption="Fields with their best pick" className="max-sm:hidden">
          <thead>
            <tr>
              {head('name', 'Field')}
              {head('areaAcres', 'Acres', true)}
              {head('pickCode', 'Best pick')}
              {head('expected', 'Bu/ac', true)}
              {head('fixFirstBushels', 'Fix first', true)}
              {head('missing', 'Missing')}
            </tr>
          </thead>
          <tbody>
            {sorted.map((line) => (
              <FieldRow
                key={line.id}
                line={line}
                colour={line.pickCode ? colours.get(line.pickCode) : undefined}
                onHover={setHovered}
              />
            ))}
          </tbody>
          <tfoot>
            <tr className="font-semibold">
              <Td>All {lines.length} fields</Td>
              <Td numeric>{formatAcres(lines.reduce((sum, line) => sum + line.areaAcres, 0))}</Td>
              <Td colSpan={4} />
            </tr>
          </tfoot>
        </Table>
      </div>
    </div>
  );
}

function FieldRow({
  line,
  colour,
  onHover,
}: {
  line: FieldLine;
  colour: string | undefined;
  onHover: (id: string | null) => void;
}) {
  return (
    <tr
      className="relative hover:bg-bloom-light focus-within:bg-bloom-light"
      onMouseEnter={() => onHover(line.id)}
      onMouseLeave={() => onHover(null)}
    >
      <Td>
        <Link href={`/fields/${line.id}`} className="font-semibold after:absolute after:inset-0" onFocus={() => onHover(line.id)}>
          {line.name}
        </Link>
        <span className="block text-[0.92em] text-mute">{line.farmName ?? 'no farm'}</span>
      </Td>
      <Td numeric>{formatAcres(line.areaAcres)}</Td>
      <Td>
        {line.pickCode ? (
          <>
            <span className="flex items-center gap-2">
              <span
                aria-hidden="true"
                className="inline-block size-3.5 shrink-0 border border-ink/50"
                style={{ background: colour }}
              />
              <span className="whitespace-nowrap">
                <b>{line.pickCode}</b> <span className="text-mute">RM {line.pickRelativeMaturity?.toFixed(1)}</span>
              </span>
            </span>
            <span className="block text-[0.92em] text-mute xl:whitespace-nowrap">
              {line.hold === null ? '' : holdWords(line.hold)}
            </span>
          </>
        ) : (
          <span className="text-mute">{line.scored ? 'no variety fits' : 'not scored yet'}</span>
        )}
        {line.stale ? <Tag kind="attention">stale</Tag> : null}
      </Td>
      <Td numeric>
        {line.expected === null ? (
          ''
        ) : (
          <>
            <b>{formatBushels(line.expected)}</b>
            <span className="block whitespace-nowrap text-[0.92em] text-mute">
              {formatBand(line.low as number, line.high as number)}
            </span>
          </>
        )}
      </Td>
      <Td numeric title={line.fixFirstTitle ?? undefined}>
        {line.fixFirstBushels >= 0.05 ? (
          <>
            +{formatBushels(line.fixFirstBushels)}
            <span className="block text-[0.92em] text-mute">{line.fixFirstTitle}</span>
          </>
        ) : (
          <span className="text-mute">—</span>
        )}
      </Td>
      <Td className="text-mute">{missingWords(line.missing)}</Td>
    </tr>
  );
}
