'use client';

import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { SelectField, TextAreaField } from '@/lib/ui/form';

/** A comment on the plan or on one of its fields. */
export function CommentForm({
  action,
  hidden,
  fields,
}: {
  action: FormAction;
  hidden: Record<string, string>;
  fields: { id: string; name: string }[];
}) {
  return (
    <ActionForm action={action} submit="Write it down" kind="plain" hidden={hidden}>
      {(answer) => (
        <>
          <SelectField name="fieldId" label="About">
            <option value="">the whole plan</option>
            {fields.map((field) => (
              <option key={field.id} value={field.id}>
                {field.name}
              </option>
            ))}
          </SelectField>
          <TextAreaField name="word" label="Comment" error={problemFor(answer, 'word')} required />
        </>
      )}
    </ActionForm>
  );
}
