import { formatDate } from '@/lib/dates';
import type { FormAction } from '@/lib/ui/action-form';
import { OneButtonForm } from '@/lib/ui/one-button-form';
import { Table, Td, Th } from '@/lib/ui/table';

export interface InvitationRow {
  id: string;
  name: string;
  email: string;
  role: string;
  operationName: string | null;
  expiresAt: number;
}

/** Invitations still open, and the button that takes one back. */
export function InvitationsTable({ invitations, withdraw }: { invitations: InvitationRow[]; withdraw: FormAction }) {
  return (
    <Table caption="Open invitations">
      <thead>
        <tr>
          <Th>Invited</Th>
          <Th>As</Th>
          <Th className="max-sm:hidden">Good until</Th>
          <Th>
            <span className="sr-only">Take back</span>
          </Th>
        </tr>
      </thead>
      <tbody>
        {invitations.map((one) => (
          <tr key={one.id}>
            <Td>
              <span className="block font-semibold">{one.name}</span>
              <span className="block break-all text-mute">{one.email}</span>
            </Td>
            <Td>
              {one.role}
              {one.operationName ? <span className="block text-mute">{one.operationName}</span> : null}
            </Td>
            <Td className="max-sm:hidden">{formatDate(new Date(one.expiresAt).toISOString().slice(0, 10))}</Td>
            <Td>
              <OneButtonForm
                action={withdraw}
                label="Take back"
                describes={`Take back the invitation of ${one.name}`}
                hidden={{ invitationId: one.id }}
              />
            </Td>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
