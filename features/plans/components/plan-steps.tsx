'use client';

import type { ReactNode } from 'react';
import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import type { ButtonKind } from '@/lib/ui/button';
import { buttonClass } from '@/lib/ui/button';
import { TextAreaField, TextField } from '@/lib/ui/form';
import { mayStep, type PlanState } from '../states';

type Role = 'grower' | 'rep' | 'manager';

export interface StepActions {
  propose: FormAction;
  withdraw: FormAction;
  reopen: FormAction;
  agree: FormAction;
  askChange: FormAction;
}

/** The steps open to this person from this state, each a form that opens in place. */
export function PlanSteps({
  role,
  state,
  operationId,
  season,
  revision,
  placed,
  actions,
}: {
  role: Role;
  state: PlanState;
  operationId: string;
  season: number;
  revision: number;
  /** Fields with a variety. */
  placed: number;
  actions: StepActions;
}) {
  const hidden = { operationId, season: String(season), revision: String(revision) };
  return (
    <>
      {mayStep('propose', state, role) && placed > 0 ? (
        <Step label="Propose to grower" kind="action">
          <ActionForm action={actions.propose} submit="Propose and hold the seed" hidden={hidden}>
            {(answer) => (
              <TextAreaField
                name="word"
                label="A word to the grower"
                hint="Goes with the mail; may stay empty."
                error={problemFor(answer, 'word')}
              />
            )}
          </ActionForm>
        </Step>
      ) : null}
      {mayStep('withdraw', state, role) ? (
        <Step label="Take back">
          <ActionForm action={actions.withdraw} submit="Take back and free the seed" kind="plain" hidden={hidden}>
            {(answer) => <TextAreaField name="word" label="Why" hint="May stay empty." error={problemFor(answer, 'word')} />}
          </ActionForm>
        </Step>
      ) : null}
      {mayStep('reopen', state, role) ? (
        <Step label="Open again">
          <ActionForm action={actions.reopen} submit="Open the agreed plan again" kind="danger" hidden={hidden}>
            {(answer) => (
              <TextAreaField name="word" label="Why the agreed plan has to change" error={problemFor(answer, 'word')} required />
            )}
          </ActionForm>
        </Step>
      ) : null}
      {mayStep('ask change', state, role) ? (
        <Step label="Ask for a change">
          <ActionForm action={actions.askChange} submit="Ask for the change" kind="plain" hidden={hidden}>
            {(answer) => <TextAreaField name="word" label="What should change" error={problemFor(answer, 'word')} required />}
          </ActionForm>
        </Step>
      ) : null}
      {mayStep('agree', state, role) ? (
        <Step label="Agree to the plan" kind="action">
          <ActionForm action={actions.agree} submit="I agree to this plan" hidden={hidden}>
            {(answer) => (
              <TextField
                name="signedName"
                label="Your full name"
                hint="Typing it is your signature. The plan is frozen as you see it and its seed reserved."
                autoComplete="name"
                error={problemFor(answer, 'signedName')}
                required
              />
            )}
          </ActionForm>
        </Step>
      ) : null}
    </>
  );
}

/** A button that opens a small form under it; plain details, so it works before any script has loaded. */
export function Step({ label, kind = 'plain', children }: { label: string; kind?: ButtonKind; children: ReactNode }) {
  return (
    <details className="group relative">
      <summary className={`${buttonClass(kind)} cursor-pointer list-none [&::-webkit-details-marker]:hidden`}>{label}</summary>
      <div className="mt-2 border border-ink bg-paper p-4 lg:absolute lg:right-0 lg:z-20 lg:w-96">{children}</div>
    </details>
  );
}
