import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { signIn } from '@/features/accounts/actions';
import { Door } from '@/features/accounts/components/door';
import { SignInForm } from '@/features/accounts/components/sign-in-form';
import { currentViewer } from '@/features/accounts/viewer';
import { Notice } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ changed?: string; everywhere?: string }> }) {
  if (await currentViewer()) redirect('/');
  const { changed, everywhere } = await searchParams;
  return (
    <Door title="Sign in" lead="Accounts come by invitation from your seed dealership.">
      {changed ? (
        <Notice kind="good" className="mb-4">
          Your password is changed and every session is signed out. Sign in with the new one.
        </Notice>
      ) : null}
      {everywhere ? (
        <Notice kind="good" className="mb-4">
          You are signed out on every device.
        </Notice>
      ) : null}
      <SignInForm action={signIn} />
    </Door>
  );
}
