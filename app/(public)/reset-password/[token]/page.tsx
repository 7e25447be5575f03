import type { Metadata } from 'next';
import { resetPassword } from '@/features/accounts/actions';
import { Door } from '@/features/accounts/components/door';
import { ResetPasswordForm } from '@/features/accounts/components/password-forms';
import { passwordResetIsOpen } from '@/features/accounts/password-reset';
import { LinkButton } from '@/lib/ui/button';

export const metadata: Metadata = { title: 'Choose a new password', referrer: 'no-referrer' };

export default async function ResetPasswordPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  if (!(await passwordResetIsOpen(token))) {
    return (
      <Door
        title="This link is no longer good"
        lead="It was used already, a newer password was chosen, or its 60 minutes are over."
      >
        <p className="mb-4">Your password is as it was. Ask for a new link if you still need one.</p>
        <LinkButton href="/forgot-password" kind="action">
          Ask for a new link
        </LinkButton>
      </Door>
    );
  }
  return (
    <Door title="Choose a new password" lead="It signs out every other session of your account.">
      <ResetPasswordForm action={resetPassword} token={token} />
    </Door>
  );
}
