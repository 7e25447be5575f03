'use client';

import { type FormEvent, Fragment, type ReactNode, startTransition, useActionState, useState } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button, type ButtonKind } from './button';
import { Notice } from './page';

export type ActionState = Outcome<{ words: string }> | null;
export type FormAction = (before: ActionState, form: FormData) => Promise<ActionState>;

/** The words for one input of a failed action, if any. */
export function problemFor(state: ActionState, path: string): string | null {
  if (!state || state.ok) return null;
  return state.problems.find((problem) => problem.path === path)?.message ?? null;
}

/**
 * A form bound to a server action. Problems without a field stand above it; those with one are handed to `children`.
 * Works without JavaScript too: the action runs on the server either way. What was typed stays while it is refused, and
 * the inputs start anew once it is kept.
 */
export function ActionForm({
  action,
  submit,
  kind = 'action',
  children,
  hidden = {},
  className = 'flex flex-col gap-4',
}: {
  action: FormAction;
  submit: ReactNode;
  kind?: ButtonKind;
  children?: (state: ActionState) => ReactNode;
  hidden?: Record<string, string>;
  className?: string;
}) {
  const [state, run, pending] = useActionState(action, null);
  const [kept, setKept] = useState({ state, times: 0 });
  if (kept.state !== state) setKept({ state, times: kept.times + (state?.ok ? 1 : 0) });
  // React empties a form after its action even when the action refused; sent by hand, it keeps what was typed.
  const send = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget, (event.nativeEvent as SubmitEvent).submitter);
    startTransition(() => run(form));
  };
  const loose = state && !state.ok ? state.problems.filter((problem) => !problem.path) : [];
  return (
    <form action={run} onSubmit={send} className={className} noValidate>
      {loose.length > 0 ? (
        <Notice kind="error">
          {loose.map((problem) => (
            <p key={problem.message}>{problem.message}</p>
          ))}
        </Notice>
      ) : null}
      {state?.ok ? <Notice kind="good">{state.value.words}</Notice> : null}
      {Object.entries(hidden).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
      <Fragment key={kept.times}>{children?.(state)}</Fragment>
      <div>
        <Button type="submit" kind={kind} pending={pending}>
          {submit}
        </Button>
      </div>
    </form>
  );
}
