import type { Metadata } from 'next';
import { LinkButton } from '@/lib/ui/button';
import { EmptyState, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Not found' };

/** A page that is not there, or not for this account: both look the same. */
export default function WorkNotFound() {
  return (
    <Page narrow>
      <PageHeader title="Nothing here" />
      <EmptyState
        title="No such page, or not one for your account"
        action={
          <LinkButton href="/" kind="action">
            Go to my start page
          </LinkButton>
        }
      >
        The address may be mistyped, what it names may be gone, or it belongs to somebody else. Nothing was changed.
      </EmptyState>
    </Page>
  );
}
