'use client';

import { type ReactNode, useActionState } from 'react';
import type { FormAction } from './action-form';
import { Button, type ButtonKind } from './button';

/** One small button that does one thing to one row, with the words of what came of it beside it. */
export function OneButtonForm({
  action,
  label,
  describes,
  hidden,
  kind = 'plain',
}: {
  action: FormAction;
  label: ReactNode;
  /** What the button is about, for people who hear it: "Disable Jon Wieland". */
  describes: string;
  hidden: Record<string, string>;
  kind?: ButtonKind;
}) {
  const [state, run, pending] = useActionState(action, null);
  return (
    <form action={run} className="inline-flex flex-wrap items-center gap-2">
      {Object.entries(hidden).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <Button type="submit" kind={kind} small pending={pending} aria-label={describes}>
        {label}
      </Button>
      {state ? (
        <span role={state.ok ? 'status' : 'alert'} className={state.ok ? 'text-leaf' : 'text-rust-deep'}>
          {state.ok ? state.value.words : state.problems.map((problem) => problem.message).join(' ')}
        </span>
      ) : null}
    </form>
  );
}
