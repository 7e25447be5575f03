'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { useForm } from 'react-hook-form';
import { TOLERANCES } from '@/features/placement/engine/model';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { CheckField, SelectField, TextAreaField, TextField } from '@/lib/ui/form';
import { Notice } from '@/lib/ui/page';
import { formatCell } from '../cells';
import { COLUMNS, type Column } from '../columns';
import type { LineUpVariety } from '../model';

type Values = Record<string, string | boolean | string[]>;

const FORM_COLUMNS = COLUMNS.filter((column) => !column.ofLot && !['tolerances', 'note'].includes(column.key));

/** A variety's traits in one form; an empty box is not rated. */
export function VarietyForm({
  variety,
  save,
}: {
  variety: LineUpVariety | null;
  save: (input: unknown) => Promise<Outcome<unknown>>;
}) {
  const router = useRouter();
  const [outcome, setOutcome] = useState<Outcome<unknown> | null>(null);
  const [pending, startTransition] = useTransition();
  const form = useForm<Values>({
    defaultValues: {
      ...Object.fromEntries(
        FORM_COLUMNS.map((column) => [
          column.key,
          variety ? formatCell(column, variety[column.key as keyof LineUpVariety]) : column.key === 'release' ? 'full' : '',
        ]),
      ),
      tolerances: variety?.tolerances ?? [],
      note: variety?.note ?? '',
      published: variety?.published ?? true,
    },
  });
  const problemOf = (key: string) =>
    outcome && !outcome.ok ? (outcome.problems.find((problem) => problem.path === key)?.message ?? null) : null;
  const loose = outcome && !outcome.ok ? outcome.problems.filter((problem) => !problem.path) : [];

  const submit = form.handleSubmit((values) =>
    startTransition(async () => {
      const tolerances = [values.tolerances].flat().filter(Boolean);
      const answer = await save({
        ...values,
        tolerances,
        ...(variety ? { varietyId: variety.id, revision: variety.revision } : {}),
      });
      setOutcome(answer);
      if (!answer.ok) return;
      const made = (answer.value as { varietyId?: string } | null)?.varietyId;
      if (made) router.push(`/line-up/${made}`);
      router.refresh();
    }),
  );

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-5">
      {loose.length > 0 ? (
        <Notice kind="error" title="Not kept">
          {loose.map((problem) => (
            <p key={problem.message}>{problem.message}</p>
          ))}
        </Notice>
      ) : null}
      {outcome?.ok ? <Notice kind="good">Kept.</Notice> : null}
      <p className="text-mute">
        Ratings run from 1 to 9; <b>9 is best</b>. Leave empty what is not rated.
      </p>
      <div className="grid items-start gap-4 sm:grid-cols-2 lg:grid-cols-3">
        {FORM_COLUMNS.map((column) => (
          <TraitInput key={column.key} column={column} error={problemOf(column.key)} register={form.register(column.key)} />
        ))}
      </div>
      <fieldset>
        <legend className="font-semibold">Herbicide tolerances</legend>
        <p className="text-[0.92em] text-mute">None chosen: conventional.</p>
        <div className="flex flex-wrap gap-x-6">
          {TOLERANCES.map((tolerance) => (
            <CheckField key={tolerance} label={tolerance} value={tolerance} {...form.register('tolerances')} />
          ))}
        </div>
      </fieldset>
      <TextAreaField label="Note" {...form.register('note')} error={problemOf('note')} />
      <CheckField
        label="Published"
        hint="Growers see it and fields are scored against it. Unticked: a draft."
        {...form.register('published')}
      />
      <div>
        <Button type="submit" kind="action" pending={pending}>
          {variety ? 'Keep the changes' : 'Add the variety'}
        </Button>
      </div>
    </form>
  );
}

function TraitInput({ column, error, register }: { column: Column; error: string | null; register: object }) {
  if (column.kind === 'choice') {
    return (
      <SelectField label={column.label} error={error} {...register}>
        {column.key === 'release' ? null : <option value="">not said</option>}
        {column.words?.map((word) => (
          <option key={word} value={word}>
            {word}
          </option>
        ))}
      </SelectField>
    );
  }
  const hint =
    column.kind === 'genes' ? '1k;3a, empty for none' : column.kind === 'maturity' ? '2.4; early groups like 00.7' : undefined;
  return (
    <TextField
      label={column.label}
      hint={hint}
      error={error}
      inputMode={column.kind === 'rating' ? 'decimal' : undefined}
      {...register}
    />
  );
}
