'use client';

import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { SelectField, TextAreaField, TextField } from '@/lib/ui/form';
import { STATE_CODES } from '../model';

/** Name, place and note of an operation: a new one, or the one given. */
export function OperationForm({
  action,
  operation,
  reps = [],
}: {
  action: FormAction;
  operation?: { id: string; name: string; state: string | null; county: string | null; note: string | null };
  /** For a manager making a new one: who will serve it. */
  reps?: { id: string; name: string }[];
}) {
  return (
    <ActionForm
      action={action}
      submit={operation ? 'Keep' : 'Make the operation'}
      kind={operation ? 'plain' : 'action'}
      hidden={operation ? { operationId: operation.id } : {}}
    >
      {(state) => (
        <>
          <TextField
            label="Name"
            name="name"
            defaultValue={operation?.name}
            autoComplete="off"
            error={problemFor(state, 'name')}
          />
          <div className="grid grid-cols-[8rem_1fr] gap-3">
            <SelectField label="State" name="state" defaultValue={operation?.state ?? ''} error={problemFor(state, 'state')}>
              <option value="">Not said</option>
              {STATE_CODES.map((code) => (
                <option key={code} value={code}>
                  {code}
                </option>
              ))}
            </SelectField>
            <TextField
              label="County"
              name="county"
              defaultValue={operation?.county ?? ''}
              autoComplete="off"
              error={problemFor(state, 'county')}
            />
          </div>
          {reps.length > 0 ? (
            <SelectField label="Rep" name="repId" defaultValue="" error={problemFor(state, 'repId')}>
              <option value="">Nobody yet</option>
              {reps.map((one) => (
                <option key={one.id} value={one.id}>
                  {one.name}
                </option>
              ))}
            </SelectField>
          ) : null}
          {operation ? (
            <TextAreaField
              label="Note"
              hint="Seen by reps and managers."
              name="note"
              defaultValue={operation.note ?? ''}
              error={problemFor(state, 'note')}
            />
          ) : null}
        </>
      )}
    </ActionForm>
  );
}
