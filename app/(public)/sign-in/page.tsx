import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { signIn } from '@/features/accounts/actions';
import { SignInForm } from '@/features/accounts/components/sign-in-form';
import { currentViewer } from '@/features/accounts/viewer';
import { Notice, Page } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Sign in' };

export default async function SignInPage({ searchParams }: { searchParams: Promise<{ changed?: string }> }) {
  if (await currentViewer()) redirect('/');
  const { changed } = await searchParams;
  return (
    <Page narrow>
      <div className="mx-auto max-w-md">
        <h1 className="mb-5 text-3xl">Sign in</h1>
        {changed ? (
          <Notice kind="good" className="mb-4">
            Your password is changed and every session is signed out. Sign in with the new one.
          </Notice>
        ) : null}
        <SignInForm action={signIn} />
      </div>
    </Page>
  );
}
