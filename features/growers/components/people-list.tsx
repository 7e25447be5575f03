import type { FormAction } from '@/lib/ui/action-form';
import { OneButtonForm } from '@/lib/ui/one-button-form';

/** People of one kind on an operation; a manager may take each off. */
export function PeopleList({
  title,
  people,
  none,
  operationId,
  unassign,
}: {
  title: string;
  people: { id: string; name: string }[];
  none: string;
  operationId: string;
  unassign: FormAction | null;
}) {
  return (
    <div>
      <h3 className="mb-1 text-mute">{title}</h3>
      {people.length === 0 ? <p>{none}</p> : null}
      <ul>
        {people.map((one) => (
          <li key={one.id} className="flex min-h-11 items-center justify-between gap-3 border-line border-b lg:min-h-10">
            <span className="font-semibold">{one.name}</span>
            {unassign ? (
              <OneButtonForm
                action={unassign}
                label="Take off"
                describes={`Take ${one.name} off this operation`}
                hidden={{ operationId, personId: one.id }}
              />
            ) : null}
          </li>
        ))}
      </ul>
    </div>
  );
}
