'use client';

import { useId } from 'react';
import { Table, Td, Th } from '@/lib/ui/table';
import type { SoilInspection } from '../import-model';
import { MEANING_LABELS, type Meaning } from '../readers/meanings';

const SELECT = 'min-h-11 w-full min-w-44 border border-ink/40 bg-white px-2 lg:min-h-8';

/** Every column of the file beside what it means; a wrong guess is put right with a choice. */
export function MatchColumns({
  columns,
  chosen,
  disabled,
  onChange,
}: {
  columns: SoilInspection['columns'];
  chosen: Record<string, string>;
  disabled: boolean;
  onChange: (header: string, meaning: string) => void;
}) {
  const id = useId();
  const several = new Set(columns.map((column) => column.table)).size > 1;
  return (
    <Table caption="Columns of the file" stacked>
      <thead>
        <tr>
          <Th>Column in the file</Th>
          <Th>First values</Th>
          <Th>What it is</Th>
        </tr>
      </thead>
      <tbody>
        {columns.map((column) => {
          const meaning = chosen[column.header] ?? column.meaning ?? '';
          const labelId = `${id}-${column.table}-${column.index}`;
          return (
            <tr key={`${column.table} ${column.index}`} className={meaning ? '' : 'bg-hull/60'}>
              <Td className="break-words">
                <span id={labelId} className="font-semibold">
                  {column.header || `Column ${column.index + 1}`}
                </span>
                {several ? <span className="block text-mute">{column.table}</span> : null}
              </Td>
              <Td className="max-w-72 break-words text-mute">{column.samples.join(' · ') || '(empty)'}</Td>
              <Td>
                <select
                  aria-labelledby={labelId}
                  className={SELECT}
                  value={meaning}
                  disabled={disabled}
                  onChange={(event) => onChange(column.header, event.target.value)}
                >
                  <option value="">Leave it out</option>
                  {(Object.keys(MEANING_LABELS) as Meaning[]).map((one) => (
                    <option key={one} value={one}>
                      {MEANING_LABELS[one]}
                    </option>
                  ))}
                </select>
              </Td>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
