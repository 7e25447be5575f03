'use client';

import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { Notice } from '@/lib/ui/page';
import { ALL_FACT_FIELDS, factText } from '../facts-fields';
import type { FieldFacts } from '../model';

/** Says once what holds for many fields: copies chosen facts of this field to others of the operation. */
export function CopyFacts({
  fieldId,
  season,
  facts,
  others,
  copy,
}: {
  fieldId: string;
  season: number;
  facts: FieldFacts;
  others: { id: string; name: string; farmName: string | null }[];
  copy: (input: unknown) => Promise<Outcome<{ count: number }>>;
}) {
  const known = ALL_FACT_FIELDS.filter((one) => facts[one.name] !== null);
  const [names, setNames] = useState<string[]>([]);
  const [fieldIds, setFieldIds] = useState<string[]>([]);
  const [outcome, setOutcome] = useState<Outcome<{ count: number }> | null>(null);
  const [pending, startTransition] = useTransition();
  if (others.length === 0 || known.length === 0) return null;
  const toggled = (list: string[], one: string) => (list.includes(one) ? list.filter((each) => each !== one) : [...list, one]);
  const box = (key: string, label: string, checked: boolean, onChange: () => void) => (
    <label key={key} className="flex min-h-11 items-center gap-2 lg:min-h-7">
      <input type="checkbox" className="size-5 accent-bloom lg:size-4" checked={checked} onChange={onChange} />
      {label}
    </label>
  );
  return (
    <details className="mt-8 border border-line bg-paper px-4 py-3">
      <summary className="cursor-pointer font-semibold">Copy facts of this field to other fields</summary>
      <div className="mt-3 grid gap-5 sm:grid-cols-2">
        <fieldset>
          <legend className="font-semibold">Which facts (as they are kept)</legend>
          {known.map((one) =>
            box(one.name, `${one.label}: ${factText(facts[one.name])}`, names.includes(one.name), () =>
              setNames(toggled(names, one.name)),
            ),
          )}
        </fieldset>
        <fieldset>
          <legend className="font-semibold">To which fields</legend>
          {box('all', 'All of them', fieldIds.length === others.length, () =>
            setFieldIds(fieldIds.length === others.length ? [] : others.map((one) => one.id)),
          )}
          {others.map((one) =>
            box(one.id, `${one.name}${one.farmName ? `, ${one.farmName}` : ''}`, fieldIds.includes(one.id), () =>
              setFieldIds(toggled(fieldIds, one.id)),
            ),
          )}
        </fieldset>
      </div>
      {outcome ? (
        <Notice kind={outcome.ok ? 'good' : 'error'} className="mt-3">
          {outcome.ok ? `Copied to ${outcome.value.count} fields.` : outcome.problems.map((problem) => problem.message).join(' ')}
        </Notice>
      ) : null}
      <Button
        className="mt-3"
        pending={pending}
        disabled={names.length === 0 || fieldIds.length === 0}
        onClick={() => startTransition(async () => setOutcome(await copy({ fieldId, season, names, toFieldIds: fieldIds })))}
      >
        Copy {names.length} {names.length === 1 ? 'fact' : 'facts'} to {fieldIds.length}{' '}
        {fieldIds.length === 1 ? 'field' : 'fields'}
      </Button>
    </details>
  );
}
