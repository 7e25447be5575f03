'use client';

import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { SelectField } from '@/lib/ui/form';

/** Assigns a rep or grower to an operation; with `operationId` the operation is given. */
export function AssignForm({
  action,
  people,
  operations,
  operationId,
}: {
  action: FormAction;
  people: { id: string; name: string; role: string }[];
  operations: { id: string; name: string }[];
  operationId?: string;
}) {
  return (
    <ActionForm action={action} submit="Assign" kind="plain" hidden={operationId ? { operationId } : {}}>
      {(state) => (
        <>
          <SelectField label="Person" name="personId" defaultValue="" error={problemFor(state, 'personId')}>
            <option value="">Choose a rep or grower</option>
            {people.map((one) => (
              <option key={one.id} value={one.id}>
                {one.name}, {one.role}
              </option>
            ))}
          </SelectField>
          {operationId ? null : (
            <SelectField label="Operation" name="operationId" defaultValue="" error={problemFor(state, 'operationId')}>
              <option value="">Choose an operation</option>
              {operations.map((one) => (
                <option key={one.id} value={one.id}>
                  {one.name}
                </option>
              ))}
            </SelectField>
          )}
        </>
      )}
    </ActionForm>
  );
}
