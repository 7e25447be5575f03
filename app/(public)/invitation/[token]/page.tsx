import type { Metadata } from 'next';
import { acceptInvitation } from '@/features/accounts/actions';
import { Door } from '@/features/accounts/components/door';
import { InvitationForm } from '@/features/accounts/components/password-forms';
import { openInvitation } from '@/features/accounts/invitation';
import { LinkButton } from '@/lib/ui/button';

export const metadata: Metadata = { title: 'Open your account', referrer: 'no-referrer' };

export default async function InvitationPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const invitation = await openInvitation(token);
  if (!invitation) {
    return (
      <Door title="This invitation is no longer good" lead="It was used already, taken back, or its 14 days are over.">
        <p className="mb-4">If you have an account, sign in. Otherwise ask your dealership for a new invitation.</p>
        <LinkButton href="/sign-in" kind="action">
          Sign in
        </LinkButton>
      </Door>
    );
  }
  return (
    <Door
      title="Open your account"
      lead={
        <>
          {invitation.dealershipName} invites you as a {invitation.role}. You will sign in with{' '}
          <b className="break-words">{invitation.email}</b>.
        </>
      }
    >
      <InvitationForm action={acceptInvitation} token={token} name={invitation.name} email={invitation.email} />
    </Door>
  );
}
