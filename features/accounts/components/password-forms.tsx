'use client';

import { ActionForm, type ActionState, type FormAction, problemFor } from '@/lib/ui/action-form';
import { TextField } from '@/lib/ui/form';
import { SHORTEST_PASSWORD_CHARACTERS } from '../password-rules';

function NewPassword({ state }: { state: ActionState }) {
  return (
    <>
      <TextField
        label="New password"
        hint={`At least ${SHORTEST_PASSWORD_CHARACTERS} characters. A few unrelated words are easy to keep and hard to guess.`}
        name="password"
        type="password"
        autoComplete="new-password"
        required
        error={problemFor(state, 'password')}
      />
      <TextField
        label="The same again"
        name="repeated"
        type="password"
        autoComplete="new-password"
        required
        error={problemFor(state, 'repeated')}
      />
    </>
  );
}

/** Asks for a mailed link. */
export function ForgotPasswordForm({ action }: { action: FormAction }) {
  return (
    <ActionForm action={action} submit="Mail me a link">
      {(state) => (
        <TextField label="E-mail" name="email" type="email" autoComplete="username" required error={problemFor(state, 'email')} />
      )}
    </ActionForm>
  );
}

/** Chooses a new password by a mailed link. */
export function ResetPasswordForm({ action, token }: { action: FormAction; token: string }) {
  return (
    <ActionForm action={action} submit="Keep this password" hidden={{ token }}>
      {(state) => <NewPassword state={state} />}
    </ActionForm>
  );
}

/** Opens the account an invitation offers. */
export function InvitationForm({
  action,
  token,
  name,
  email,
}: {
  action: FormAction;
  token: string;
  name: string;
  email: string;
}) {
  return (
    <ActionForm action={action} submit="Open my account" hidden={{ token }}>
      {(state) => (
        <>
          {/* For password managers: the name under which the password is kept. */}
          <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
          <TextField
            label="Your name"
            name="name"
            autoComplete="name"
            defaultValue={name}
            required
            error={problemFor(state, 'name')}
          />
          <NewPassword state={state} />
        </>
      )}
    </ActionForm>
  );
}

/** Changes one's own password. */
export function ChangePasswordForm({ action }: { action: FormAction }) {
  return (
    <ActionForm action={action} submit="Change the password" kind="plain">
      {(state) => (
        <>
          <TextField
            label="Present password"
            name="current"
            type="password"
            autoComplete="current-password"
            required
            error={problemFor(state, 'current')}
          />
          <NewPassword state={state} />
        </>
      )}
    </ActionForm>
  );
}
