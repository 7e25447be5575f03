'use server';

import { revalidatePath } from 'next/cache';
import { cookies, headers } from 'next/headers';
import { redirect } from 'next/navigation';
import type { Outcome } from '@/lib/errors';
import * as changes from './changes';
import { closeSession, SESSION_COOKIE_NAME, type SessionCookie } from './sessions';
import * as entry from './sign-in';
import { requireViewer } from './viewer';

/** What a form shows after its action: problems by field, or a sentence. */
export type FormState = Outcome<{ words: string }> | null;

async function setCookie(cookie: SessionCookie): Promise<void> {
  (await cookies()).set(cookie.name, cookie.value, cookie.attributes);
}

async function networkAddress(): Promise<string> {
  const all = await headers();
  return all.get('x-forwarded-for')?.split(',').at(-1)?.trim() ?? all.get('x-real-ip') ?? 'local';
}

function words<Value>(outcome: Outcome<Value>, said: string): FormState {
  return outcome.ok ? { ok: true, value: { words: said } } : outcome;
}

export async function signIn(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await entry.signIn(Object.fromEntries(form), await networkAddress());
  if (!outcome.ok) return outcome;
  await setCookie(outcome.value.cookie);
  redirect('/');
}

export async function signOut(): Promise<void> {
  const value = (await cookies()).get(SESSION_COOKIE_NAME)?.value;
  if (value) await setCookie(await closeSession(value));
  redirect('/sign-in');
}

export async function askPasswordReset(_before: FormState, form: FormData): Promise<FormState> {
  return words(
    await entry.askPasswordReset(Object.fromEntries(form)),
    'If there is an account for this address, a mail with a link is on its way. The link is good for 60 minutes.',
  );
}

export async function resetPassword(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await entry.resetPassword(Object.fromEntries(form));
  if (!outcome.ok) return outcome;
  redirect('/sign-in?changed=1');
}

export async function acceptInvitation(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await entry.acceptInvitation(Object.fromEntries(form));
  if (!outcome.ok) return outcome;
  await setCookie(outcome.value.cookie);
  redirect('/');
}

export async function invitePerson(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await changes.invitePerson(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  return words(outcome, 'The invitation is on its way. Its link is good for 14 days.');
}

export async function withdrawInvitation(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await changes.withdrawInvitation(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  return words(outcome, 'The invitation is withdrawn.');
}

export async function disablePerson(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await changes.disablePerson(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  return words(outcome, 'The account is disabled and signed out.');
}

export async function enablePerson(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await changes.enablePerson(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  return words(outcome, 'The account can sign in again.');
}

export async function changeOwnAccount(_before: FormState, form: FormData): Promise<FormState> {
  const input = { name: form.get('name'), wantsMail: form.get('wantsMail') === 'on' };
  const outcome = await changes.changeOwnAccount(await requireViewer(), input);
  revalidatePath('/settings/account');
  return words(outcome, 'Kept.');
}

export async function changeOwnPassword(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await changes.changeOwnPassword(await requireViewer(), Object.fromEntries(form));
  if (!outcome.ok) return outcome;
  redirect('/sign-in?changed=1');
}

export async function changeDealership(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await changes.changeDealership(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings', 'layout');
  return words(outcome, 'Kept.');
}
