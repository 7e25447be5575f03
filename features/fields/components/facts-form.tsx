'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { TOLERANCES } from '@/features/placement/engine/model';
import type { Outcome } from '@/lib/errors';
import { Button, LinkButton } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { SelectField, TextField } from '@/lib/ui/form';
import { Caution, Notice } from '@/lib/ui/page';
import { ALL_FACT_FIELDS, FACT_GROUPS, type FactField, factText } from '../facts-fields';
import type { FieldFacts } from '../model';

type Texts = Record<string, string>;
type Programme = 'unknown' | 'none' | 'chosen';

/** How one field is farmed in a season, in one form. Every box may stay empty: unknown is unknown, and widens the range. */
export function FactsForm({
  fieldId,
  season,
  facts,
  save,
}: {
  fieldId: string;
  season: number;
  facts: FieldFacts;
  save: (input: unknown) => Promise<Outcome<null>>;
}) {
  const router = useRouter();
  const [texts, setTexts] = useState<Texts>(() =>
    Object.fromEntries(ALL_FACT_FIELDS.map((one) => [one.name, factText(facts[one.name])])),
  );
  const [programme, setProgramme] = useState<Programme>(
    facts.weedProgramme === null ? 'unknown' : facts.weedProgramme.length === 0 ? 'none' : 'chosen',
  );
  const [tolerances, setTolerances] = useState<string[]>(facts.weedProgramme ?? []);
  const [outcome, setOutcome] = useState<Outcome<null> | null>(null);
  const [pending, startTransition] = useTransition();
  const problems = new Map(
    outcome && !outcome.ok ? outcome.problems.map((problem) => [problem.path?.split('.')[1] ?? '', problem.message]) : [],
  );
  const loose = outcome && !outcome.ok ? outcome.problems.filter((problem) => !problem.path?.startsWith('facts.')) : [];

  function submit() {
    startTransition(async () => {
      const weedProgramme = programme === 'unknown' ? null : programme === 'none' ? [] : tolerances;
      const answer = await save({ fieldId, season, facts: { ...texts, weedProgramme } });
      setOutcome(answer);
      if (answer.ok) router.refresh();
    });
  }

  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        submit();
      }}
      className="flex flex-col gap-7"
    >
      {FACT_GROUPS.map((group) => (
        <fieldset key={group.title} className="border-line border-t pt-4">
          <legend className="pr-3 font-display font-bold text-[1.2em]">{group.title}</legend>
          <div className="grid items-start gap-4 sm:grid-cols-2 lg:grid-cols-3">
            {group.fields.map((one) =>
              one.kind === 'tolerances' ? (
                <ProgrammeField
                  key={one.name}
                  programme={programme}
                  tolerances={tolerances}
                  error={problems.get(one.name) ?? null}
                  onProgramme={setProgramme}
                  onTolerances={setTolerances}
                />
              ) : (
                <FactInput
                  key={one.name}
                  field={one}
                  value={texts[one.name] ?? ''}
                  error={problems.get(one.name) ?? null}
                  onChange={(value) => setTexts((before) => ({ ...before, [one.name]: value }))}
                />
              ),
            )}
          </div>
        </fieldset>
      ))}
      <Caution>
        {CAUTIONS.herbicide} {CAUTIONS.treatedSeed}
      </Caution>
      {outcome?.ok ? <Notice kind="good">Kept. The picks of this field are stale now; score again to renew them.</Notice> : null}
      {outcome && !outcome.ok ? (
        <Notice kind="error" title="Not kept">
          {loose.length > 0 ? (
            loose.map((problem) => <p key={problem.message}>{problem.message}</p>)
          ) : (
            <p>Mend the boxes marked above, then keep again.</p>
          )}
        </Notice>
      ) : null}
      <div className="sticky bottom-0 flex flex-wrap gap-2 border-line border-t bg-hull py-3">
        <Button type="submit" kind="action" pending={pending}>
          Keep the facts
        </Button>
        <LinkButton href={`/fields/${fieldId}`}>Back to the field</LinkButton>
      </div>
    </form>
  );
}

function FactInput({
  field,
  value,
  error,
  onChange,
}: {
  field: FactField;
  value: string;
  error: string | null;
  onChange: (value: string) => void;
}) {
  const { label, hint, unit, kind } = field;
  if (kind === 'yesno' || kind === 'choice') {
    return (
      <SelectField
        label={label}
        hint={hint}
        error={error}
        name={field.name}
        value={value}
        onChange={(event) => onChange(event.target.value)}
      >
        <option value="">unknown</option>
        {(kind === 'yesno' ? ['yes', 'no'] : (field.choices ?? [])).map((choice) => (
          <option key={choice} value={choice}>
            {choice}
          </option>
        ))}
      </SelectField>
    );
  }
  return (
    <TextField
      label={label}
      hint={hint}
      error={error}
      unit={unit}
      name={field.name}
      type={kind === 'date' ? 'date' : 'text'}
      inputMode={kind === 'number' ? 'decimal' : undefined}
      value={value}
      placeholder={kind === 'date' ? undefined : 'unknown'}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}

function ProgrammeField({
  programme,
  tolerances,
  error,
  onProgramme,
  onTolerances,
}: {
  programme: Programme;
  tolerances: string[];
  error: string | null;
  onProgramme: (programme: Programme) => void;
  onTolerances: (tolerances: string[]) => void;
}) {
  return (
    <div>
      <SelectField
        label="Tolerances the programme needs"
        hint="A variety without one of them leaves the picks."
        error={error}
        value={programme}
        onChange={(event) => onProgramme(event.target.value as Programme)}
      >
        <option value="unknown">unknown</option>
        <option value="none">none: it asks for nothing</option>
        <option value="chosen">these:</option>
      </SelectField>
      {programme === 'chosen' ? (
        <div className="mt-2 flex flex-col">
          {TOLERANCES.map((tolerance) => (
            <label key={tolerance} className="flex min-h-11 items-center gap-2 lg:min-h-7">
              <input
                type="checkbox"
                className="size-5 accent-bloom lg:size-4"
                checked={tolerances.includes(tolerance)}
                onChange={(event) =>
                  onTolerances(event.target.checked ? [...tolerances, tolerance] : tolerances.filter((one) => one !== tolerance))
                }
              />
              {tolerance}
            </label>
          ))}
        </div>
      ) : null}
    </div>
  );
}
