import { Button } from '@/lib/ui/button';
import { SelectField } from '@/lib/ui/form';
import { AUDIT_KINDS } from '../audit';

/** What, who and whose; a plain form whose choice stands in the address. */
export function AuditFilter({
  chosen,
  people,
  operations,
}: {
  chosen: { kind?: string; person?: string; operation?: string };
  people: { id: string; name: string }[];
  operations: { id: string; name: string }[];
}) {
  return (
    <form method="get" action="/settings/audit" className="mb-5 flex flex-wrap items-end gap-3">
      <SelectField label="What" name="kind" defaultValue={chosen.kind ?? ''} className="w-full sm:w-52">
        <option value="">Everything</option>
        {AUDIT_KINDS.map((one) => (
          <option key={one.value} value={one.value}>
            {one.label}
          </option>
        ))}
      </SelectField>
      <SelectField label="Who" name="person" defaultValue={chosen.person ?? ''} className="w-full sm:w-52">
        <option value="">Everybody</option>
        {people.map((one) => (
          <option key={one.id} value={one.id}>
            {one.name}
          </option>
        ))}
      </SelectField>
      <SelectField label="Operation" name="operation" defaultValue={chosen.operation ?? ''} className="w-full sm:w-60">
        <option value="">Every operation</option>
        {operations.map((one) => (
          <option key={one.id} value={one.id}>
            {one.name}
          </option>
        ))}
      </SelectField>
      <Button type="submit">Show</Button>
    </form>
  );
}
