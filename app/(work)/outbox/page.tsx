import type { Metadata } from 'next';
import { sendMailAgain } from '@/features/accounts/actions';
import { OutboxList } from '@/features/accounts/components/outbox-list';
import { outboxOf } from '@/features/accounts/queries';
import { requireViewer } from '@/features/accounts/viewer';
import { environment } from '@/lib/env';
import { found } from '@/lib/found';
import { EmptyState, Notice, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Outbox' };

/** The mails of the dealership, for a manager; off in production unless asked for. */
export default async function OutboxPage() {
  const viewer = await requireViewer();
  const mails = await found(outboxOf(viewer));
  return (
    <Page>
      <PageHeader title="Outbox" />
      {environment().SMTP_URL ? null : (
        <Notice kind="attention" title="No mail server is set" className="mb-5">
          Mails are kept here and go nowhere. Follow their links from here, or set SMTP_URL and start again.
        </Notice>
      )}
      {mails.length === 0 ? (
        <EmptyState title="No mail yet">Invitations, new passwords and the steps of plans are written here first.</EmptyState>
      ) : (
        <OutboxList mails={mails} sendAgain={sendMailAgain} />
      )}
    </Page>
  );
}
