import type { Metadata } from 'next';
import { changeDealership, changeOwnAccount, changeOwnPassword, signOutEverywhere } from '@/features/accounts/actions';
import { DealershipForm, OwnAccountForm } from '@/features/accounts/components/account-forms';
import { ChangePasswordForm } from '@/features/accounts/components/password-forms';
import { dealershipOf, ownAccountOf } from '@/features/accounts/queries';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { Button } from '@/lib/ui/button';
import { Page, PageHeader, Panel } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'My account' };

/** One's own name, mail wishes, password and sessions; for a manager the dealership too. */
export default async function AccountPage() {
  const viewer = await requireViewer();
  const account = await ownAccountOf(viewer);
  const dealership = may(viewer, 'dealership', 'change') ? await dealershipOf(viewer) : null;
  return (
    <Page>
      <PageHeader title="My account" />
      <div className="grid max-w-5xl items-start gap-6 lg:grid-cols-2">
        <Panel aria-label="Name and mail">
          <h2 className="mb-1 text-xl">Name and mail</h2>
          <p className="mb-4 text-mute">
            {account.email}, {viewer.role} at {viewer.dealershipName}
          </p>
          <OwnAccountForm action={changeOwnAccount} account={account} />
        </Panel>
        <Panel aria-label="Password">
          <h2 className="mb-1 text-xl">Password</h2>
          <p className="mb-4 text-mute">Changing it signs out every session, this one too.</p>
          <ChangePasswordForm action={changeOwnPassword} />
        </Panel>
        {dealership ? (
          <Panel aria-label="The dealership">
            <h2 className="mb-4 text-xl">The dealership</h2>
            <DealershipForm action={changeDealership} dealership={dealership} />
          </Panel>
        ) : null}
        <Panel aria-label="Sessions">
          <h2 className="mb-1 text-xl">Sessions</h2>
          <p className="mb-4 text-mute">
            Lost a phone, or left a browser open somewhere? This ends every session of your account, on every device.
          </p>
          <form action={signOutEverywhere}>
            <Button type="submit">Sign out everywhere</Button>
          </form>
        </Panel>
      </div>
    </Page>
  );
}
