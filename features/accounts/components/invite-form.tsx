'use client';

import { useState } from 'react';
import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { SelectField, TextField } from '@/lib/ui/form';
import type { Role } from '../model';

const ROLE_WORDS: Record<Role, string> = {
  grower: 'Sees one operation: its fields, soil tests and plans.',
  rep: 'Keeps the line-up and serves the growers assigned to them.',
  manager: 'Runs the whole dealership.',
};

/** Invites a person by mail. With `operationId` it is a grower of that operation; otherwise role and operation are chosen. */
export function InviteForm({
  action,
  roles,
  operations,
  operationId,
}: {
  action: FormAction;
  roles: readonly Role[];
  operations: { id: string; name: string }[];
  operationId?: string;
}) {
  const [role, setRole] = useState<Role>(roles[0] ?? 'grower');
  const hidden: Record<string, string> = operationId ? { role: 'grower', operationId } : roles.length === 1 ? { role } : {};
  return (
    <ActionForm action={action} submit="Send the invitation" hidden={hidden}>
      {(state) => (
        <>
          {!operationId && roles.length > 1 ? (
            <SelectField
              label="Role"
              hint={ROLE_WORDS[role]}
              name="role"
              value={role}
              onChange={(event) => setRole(event.target.value as Role)}
              error={problemFor(state, 'role')}
            >
              {roles.map((one) => (
                <option key={one} value={one}>
                  {one}
                </option>
              ))}
            </SelectField>
          ) : null}
          {!operationId && role === 'grower' ? (
            <SelectField label="Operation" name="operationId" defaultValue="" error={problemFor(state, 'operationId')}>
              <option value="">Choose an operation</option>
              {operations.map((one) => (
                <option key={one.id} value={one.id}>
                  {one.name}
                </option>
              ))}
            </SelectField>
          ) : null}
          <TextField label="Name" name="name" autoComplete="off" error={problemFor(state, 'name')} />
          <TextField label="E-mail" name="email" type="email" autoComplete="off" error={problemFor(state, 'email')} />
        </>
      )}
    </ActionForm>
  );
}
