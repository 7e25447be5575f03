'use client';

import type { Polygon } from 'geojson';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { TextField } from '@/lib/ui/form';
import { boxOutline } from '../zones';

type Said = Outcome<{ words: string }>;

const DEGREES = [
  { name: 'south', label: 'South edge', hint: '42.0' },
  { name: 'north', label: 'North edge', hint: '43.5' },
  { name: 'west', label: 'West edge', hint: '−96.6' },
  { name: 'east', label: 'East edge', hint: '−90.1' },
] as const;

/** Reads degrees as people write them, with either minus; `null` when it is no number. */
function degreesOf(text: FormDataEntryValue | null): number | null {
  const value = Number(
    String(text ?? '')
      .trim()
      .replace('−', '-'),
  );
  return String(text ?? '').trim() === '' || !Number.isFinite(value) ? null : value;
}

/** Name and range for an outline: one that was drawn, or else a box said by its edges, which needs no mouse. */
export function NewZone({
  title,
  outline,
  add,
  onDone,
  onCancel,
}: {
  title: string;
  outline: Polygon | null;
  add: (input: unknown) => Promise<Said>;
  onDone: (outcome: Said) => void;
  onCancel?: () => void;
}) {
  const [problems, setProblems] = useState<Record<string, string>>({});
  const [pending, startTransition] = useTransition();
  const [times, setTimes] = useState(0);

  function send(form: FormData) {
    const found: Record<string, string> = {};
    let geometry = outline;
    if (!geometry) {
      const edges = DEGREES.map(({ name }) => degreesOf(form.get(name)));
      DEGREES.forEach(({ name }, index) => {
        if (edges[index] === null) found[name] = 'Degrees, like 42.5.';
      });
      const [south, north, west, east] = edges as number[];
      if (Object.keys(found).length === 0 && (north as number) <= (south as number)) found.north = 'North of the south edge.';
      if (Object.keys(found).length === 0 && (east as number) <= (west as number))
        found.east = 'East of the west edge: US longitudes are negative.';
      if (Object.keys(found).length === 0)
        geometry = boxOutline({ west: west as number, south: south as number, east: east as number, north: north as number });
    }
    setProblems(found);
    if (!geometry) return;
    startTransition(async () => {
      const outcome = await add({
        name: form.get('name'),
        relativeMaturityFrom: form.get('relativeMaturityFrom'),
        relativeMaturityTo: form.get('relativeMaturityTo'),
        geometry,
      });
      if (outcome.ok) setTimes((before) => before + 1);
      else setProblems(Object.fromEntries(outcome.problems.flatMap((one) => (one.path ? [[one.path, one.message]] : []))));
      onDone(outcome);
    });
  }

  const body = (
    <form
      key={times}
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        send(new FormData(event.currentTarget));
      }}
      className="flex flex-col gap-3 pt-3"
    >
      <TextField label="Name" name="name" error={problems.name} />
      {outline ? null : (
        <div className="grid grid-cols-2 gap-3">
          {DEGREES.map((edge) => (
            <TextField
              key={edge.name}
              label={edge.label}
              name={edge.name}
              unit="°"
              inputMode="text"
              placeholder={edge.hint}
              error={problems[edge.name]}
            />
          ))}
        </div>
      )}
      <div className="grid grid-cols-2 gap-3">
        <TextField
          label="RM from"
          name="relativeMaturityFrom"
          inputMode="decimal"
          placeholder="2.1"
          error={problems.relativeMaturityFrom}
        />
        <TextField
          label="RM to"
          name="relativeMaturityTo"
          inputMode="decimal"
          placeholder="2.5"
          error={problems.relativeMaturityTo}
        />
      </div>
      <div className="flex gap-2">
        <Button type="submit" kind="action" pending={pending}>
          Keep the zone
        </Button>
        {onCancel ? <Button onClick={onCancel}>Throw it away</Button> : null}
      </div>
    </form>
  );
  if (outline) {
    return (
      <section className="border border-bloom bg-bloom-light p-4">
        <h2 className="text-lg">{title}</h2>
        {body}
      </section>
    );
  }
  return (
    <details className="border border-line bg-paper p-4">
      <summary className="cursor-pointer font-display font-bold text-lg">{title}</summary>
      {body}
    </details>
  );
}
