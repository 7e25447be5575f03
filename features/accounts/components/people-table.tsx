import Link from 'next/link';
import type { FormAction } from '@/lib/ui/action-form';
import { OneButtonForm } from '@/lib/ui/one-button-form';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import type { Role } from '../model';

export interface PersonRow {
  id: string;
  name: string;
  email: string;
  role: Role;
  disabled: boolean;
  operations: { id: string; name: string }[];
}

/** Everyone in reach, what they serve or own, and, for a manager, the switch of each account. */
export function PeopleTable({
  people,
  ownId,
  switches,
}: {
  people: PersonRow[];
  ownId: string;
  /** Given to managers only. */
  switches: { disable: FormAction; enable: FormAction } | null;
}) {
  return (
    <Table caption="People">
      <thead>
        <tr>
          <Th>Name</Th>
          <Th>Role</Th>
          <Th className="max-md:hidden">Operations</Th>
          {switches ? <Th className="max-sm:hidden">Account</Th> : null}
        </tr>
      </thead>
      <tbody>
        {people.map((person) => (
          <tr key={person.id}>
            <Td>
              <span className="block font-semibold">
                {person.name}
                {person.id === ownId ? <span className="font-normal text-mute"> (you)</span> : null}
              </span>
              <span className="block break-all text-mute">{person.email}</span>
              {switches ? (
                <span className="mt-2 block sm:hidden">
                  <Switch person={person} ownId={ownId} switches={switches} />
                </span>
              ) : null}
            </Td>
            <Td>
              {person.role}
              {person.disabled ? (
                <span className="ml-2">
                  <Tag kind="error">disabled</Tag>
                </span>
              ) : null}
            </Td>
            <Td className="max-md:hidden">
              {person.role === 'manager' ? <span className="text-mute">all</span> : <Operations list={person.operations} />}
            </Td>
            {switches ? (
              <Td className="max-sm:hidden">
                <Switch person={person} ownId={ownId} switches={switches} />
              </Td>
            ) : null}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function Operations({ list }: { list: { id: string; name: string }[] }) {
  if (list.length === 0) return <span className="text-mute">none</span>;
  return (
    <ul>
      {list.map((one) => (
        <li key={one.id}>
          <Link href={`/growers/${one.id}`} className="underline decoration-line underline-offset-4 hover:decoration-ink">
            {one.name}
          </Link>
        </li>
      ))}
    </ul>
  );
}

function Switch({
  person,
  ownId,
  switches,
}: {
  person: PersonRow;
  ownId: string;
  switches: { disable: FormAction; enable: FormAction };
}) {
  if (person.id === ownId) return <span className="text-mute">your own</span>;
  return person.disabled ? (
    <OneButtonForm action={switches.enable} label="Enable" describes={`Enable ${person.name}`} hidden={{ personId: person.id }} />
  ) : (
    <OneButtonForm
      action={switches.disable}
      label="Disable"
      describes={`Disable ${person.name}`}
      hidden={{ personId: person.id }}
      kind="danger"
    />
  );
}
