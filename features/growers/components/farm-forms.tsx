'use client';

import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { TextField } from '@/lib/ui/form';

/** Adds a farm. */
export function AddFarmForm({ action, operationId }: { action: FormAction; operationId: string }) {
  return (
    <ActionForm action={action} submit="Add the farm" kind="plain" hidden={{ operationId }}>
      {(state) => <TextField label="New farm" name="name" autoComplete="off" error={problemFor(state, 'name')} />}
    </ActionForm>
  );
}

/** Renames a farm in place. */
export function RenameFarmForm({
  action,
  operationId,
  farm,
}: {
  action: FormAction;
  operationId: string;
  farm: { id: string; name: string };
}) {
  return (
    <ActionForm action={action} submit="Rename" kind="plain" hidden={{ operationId, farmId: farm.id }}>
      {(state) => (
        <TextField
          label={`New name of ${farm.name}`}
          name="name"
          defaultValue={farm.name}
          autoComplete="off"
          error={problemFor(state, 'name')}
        />
      )}
    </ActionForm>
  );
}
