'use server';

import { revalidatePath } from 'next/cache';
import { cookies, headers } from 'next/headers';
import { redirect } from 'next/navigation';
import { environment } from '@/lib/env';
import type { Outcome } from '@/lib/errors';
import * as dealership from './changes/dealership';
import * as invitations from './changes/invitations';
import * as outbox from './changes/outbox';
import * as own from './changes/own-account';
import * as people from './changes/people';
import * as invitation from './invitation';
import type { TryFrom } from './lock-out';
import * as reset from './password-reset';
import { BROWSER_COOKIE_NAME, closeSession, SESSION_COOKIE_NAME, type SessionCookie } from './sessions';
import * as entry from './sign-in';
import { requireViewer } from './viewer';

/** What a form shows after its action: problems by field, or a sentence. */
export type FormState = Outcome<{ words: string }> | null;

async function setCookies(given: SessionCookie[]): Promise<void> {
  const jar = await cookies();
  for (const one of given) jar.set(one.name, one.value, one.attributes);
}

async function browserToken(): Promise<string | null> {
  return (await cookies()).get(BROWSER_COOKIE_NAME)?.value ?? null;
}

/** The nearest proxy's word for the address, or the socket's. A made-up one only reaches the counters it names. */
async function tryFrom(): Promise<TryFrom> {
  const all = await headers();
  const address = all.get('x-forwarded-for')?.split(',').at(-1)?.trim() || 'local';
  return { address, browserToken: await browserToken() };
}

function words<Value>(outcome: Outcome<Value>, said: string): FormState {
  return outcome.ok ? { ok: true, value: { words: said } } : outcome;
}

export async function signIn(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await entry.signIn(Object.fromEntries(form), await tryFrom());
  if (!outcome.ok) return outcome;
  await setCookies(outcome.value.cookies);
  redirect('/');
}

export async function signOut(): Promise<void> {
  const value = (await cookies()).get(SESSION_COOKIE_NAME)?.value;
  if (value) await setCookies([await closeSession(value)]);
  redirect('/sign-in');
}

export async function askPasswordReset(_before: FormState, form: FormData): Promise<FormState> {
  return words(
    await reset.askPasswordReset(Object.fromEntries(form)),
    'If there is an account for this address, a mail with a link is on its way. The link is good for 60 minutes.',
  );
}

export async function resetPassword(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await reset.resetPassword(Object.fromEntries(form), await browserToken());
  if (!outcome.ok) return outcome;
  await setCookies([outcome.value.cookie]);
  redirect('/sign-in?changed=1');
}

export async function acceptInvitation(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await invitation.acceptInvitation(Object.fromEntries(form), await browserToken());
  if (!outcome.ok) return outcome;
  await setCookies(outcome.value.cookies);
  redirect('/');
}

export async function invitePerson(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await invitations.invitePerson(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  revalidatePath('/growers', 'layout');
  return words(
    outcome,
    environment().SMTP_URL
      ? 'The invitation is on its way. Its link is good for 14 days.'
      : 'No mail server is set, so the invitation is kept in the outbox, where a manager finds its link. It is good for 14 days.',
  );
}

export async function withdrawInvitation(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await invitations.withdrawInvitation(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  revalidatePath('/growers', 'layout');
  return words(outcome, 'The invitation is withdrawn.');
}

export async function disablePerson(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await people.disablePerson(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  return words(outcome, 'The account is disabled and signed out.');
}

export async function enablePerson(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await people.enablePerson(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings/people');
  return words(outcome, 'The account can sign in again.');
}

export async function changeOwnAccount(_before: FormState, form: FormData): Promise<FormState> {
  const input = { name: form.get('name'), wantsMail: form.get('wantsMail') === 'on' };
  const outcome = await own.changeOwnAccount(await requireViewer(), input);
  revalidatePath('/settings/account');
  return words(outcome, 'Kept.');
}

export async function changeOwnPassword(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await own.changeOwnPassword(await requireViewer(), Object.fromEntries(form));
  if (!outcome.ok) return outcome;
  redirect('/sign-in?changed=1');
}

export async function signOutEverywhere(): Promise<void> {
  await own.signOutEverywhere(await requireViewer());
  redirect('/sign-in?everywhere=1');
}

export async function changeDealership(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await dealership.changeDealership(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/settings', 'layout');
  return words(outcome, 'Kept.');
}

export async function sendMailAgain(_before: FormState, form: FormData): Promise<FormState> {
  const outcome = await outbox.sendMailAgain(await requireViewer(), Object.fromEntries(form));
  revalidatePath('/outbox');
  return words(outcome, 'The mail is in the queue again.');
}
