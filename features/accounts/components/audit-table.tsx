import { formatMoment } from '@/lib/dates';
import { Table, Td, Th } from '@/lib/ui/table';

export interface AuditRow {
  id: string;
  at: number;
  verb: string;
  summary: string;
  personName: string | null;
  operationName: string | null;
}

/** Who did what, when: newest first. */
export function AuditTable({ lines }: { lines: AuditRow[] }) {
  return (
    <Table caption="Audit trail, newest first">
      <thead>
        <tr>
          <Th className="max-sm:hidden">When</Th>
          <Th className="max-sm:hidden">Who</Th>
          <Th>What</Th>
          <Th className="max-md:hidden">Operation</Th>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.id}>
            <Td className="whitespace-nowrap text-mute max-sm:hidden">{formatMoment(line.at)}</Td>
            <Td className="whitespace-nowrap max-sm:hidden">{line.personName ?? 'Command line'}</Td>
            <Td className="[overflow-wrap:anywhere]">
              {line.summary}
              <span className="block text-mute text-sm sm:hidden">
                {formatMoment(line.at)} · {line.personName ?? 'Command line'}
              </span>
              <span className="block text-mute text-[0.85em] max-sm:hidden">{line.verb}</span>
            </Td>
            <Td className="max-md:hidden">{line.operationName ?? '—'}</Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
