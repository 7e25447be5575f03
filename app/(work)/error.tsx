'use client';

import { Button, LinkButton } from '@/lib/ui/button';
import { Notice, Page, PageHeader } from '@/lib/ui/page';

/** A fault of Hilum's own. What was kept stays kept; the page can be tried again. */
export default function WorkError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <Page narrow>
      <PageHeader title="This page could not be shown" />
      <Notice kind="error" title="The fault is on our side">
        <p>Everything that was kept before is still kept. Try again; if it stays, tell your dealership what you were doing.</p>
        {error.digest ? <p className="mt-1">Its number in the server’s log is {error.digest}.</p> : null}
      </Notice>
      <div className="mt-4 flex gap-2">
        <Button kind="action" onClick={reset}>
          Try again
        </Button>
        <LinkButton href="/">Go to my start page</LinkButton>
      </div>
    </Page>
  );
}
