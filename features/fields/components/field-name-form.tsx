'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { TextField } from '@/lib/ui/form';
import { Notice } from '@/lib/ui/page';

/** A field's name and farm, and taking it out of the lists. */
export function FieldNameForm({
  field,
  farmNames,
  rename,
  archive,
}: {
  field: { id: string; name: string; farmName: string | null; operationId: string };
  farmNames: string[];
  rename: (input: unknown) => Promise<Outcome<null>>;
  archive: (input: unknown) => Promise<Outcome<null>>;
}) {
  const router = useRouter();
  const [name, setName] = useState(field.name);
  const [farm, setFarm] = useState(field.farmName ?? '');
  const [sure, setSure] = useState(false);
  const [outcome, setOutcome] = useState<Outcome<null> | null>(null);
  const [pending, startTransition] = useTransition();
  return (
    <details className="mt-4 border border-line bg-paper px-4 py-3">
      <summary className="cursor-pointer font-semibold">Name, farm, or take the field out</summary>
      <div className="mt-3 grid gap-4 sm:grid-cols-2">
        <TextField label="Name" value={name} onChange={(event) => setName(event.target.value)} />
        <TextField label="Farm" value={farm} list="farms" onChange={(event) => setFarm(event.target.value)} />
        <datalist id="farms">
          {farmNames.map((one) => (
            <option key={one} value={one} />
          ))}
        </datalist>
      </div>
      {outcome ? (
        <Notice kind={outcome.ok ? 'good' : 'error'} className="mt-3">
          {outcome.ok ? 'Kept.' : outcome.problems.map((problem) => problem.message).join(' ')}
        </Notice>
      ) : null}
      <div className="mt-3 flex flex-wrap gap-2">
        <Button
          pending={pending}
          onClick={() =>
            startTransition(async () => {
              setOutcome(await rename({ fieldId: field.id, name, farm: farm.trim() || null }));
              router.refresh();
            })
          }
        >
          Keep name and farm
        </Button>
        <Button
          kind="danger"
          pending={pending}
          onClick={() => {
            if (!sure) return setSure(true);
            startTransition(async () => {
              const answer = await archive({ fieldId: field.id });
              if (answer.ok) router.push(`/fields?operation=${field.operationId}`);
              else setOutcome(answer);
            });
          }}
        >
          {sure ? `Yes, take ${field.name} out` : 'Take this field out'}
        </Button>
      </div>
    </details>
  );
}
