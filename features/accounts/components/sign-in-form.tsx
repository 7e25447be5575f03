'use client';

import Link from 'next/link';
import { ActionForm, type FormAction, problemFor } from '@/lib/ui/action-form';
import { TextField } from '@/lib/ui/form';

/** E-mail and password. */
export function SignInForm({ action }: { action: FormAction }) {
  return (
    <ActionForm action={action} submit="Sign in">
      {(state) => (
        <>
          <TextField
            label="E-mail"
            name="email"
            type="email"
            autoComplete="username"
            required
            error={problemFor(state, 'email')}
          />
          <TextField
            label="Password"
            name="password"
            type="password"
            autoComplete="current-password"
            required
            error={problemFor(state, 'password')}
          />
          <p>
            <Link href="/forgot-password" className="underline underline-offset-4">
              I have no password, or forgot it
            </Link>
          </p>
        </>
      )}
    </ActionForm>
  );
}
