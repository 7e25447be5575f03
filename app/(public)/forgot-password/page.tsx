import type { Metadata } from 'next';
import Link from 'next/link';
import { askPasswordReset } from '@/features/accounts/actions';
import { Door } from '@/features/accounts/components/door';
import { ForgotPasswordForm } from '@/features/accounts/components/password-forms';

export const metadata: Metadata = { title: 'A new password' };

export default function ForgotPasswordPage() {
  return (
    <Door title="A new password" lead="Write the e-mail of your account. We mail a link to it that is good for 60 minutes.">
      <ForgotPasswordForm action={askPasswordReset} />
      <p className="mt-5">
        <Link href="/sign-in" className="underline underline-offset-4">
          Back to sign in
        </Link>
      </p>
    </Door>
  );
}
