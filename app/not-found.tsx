import type { Metadata } from 'next';
import { Door } from '@/features/accounts/components/door';
import { LinkButton } from '@/lib/ui/button';

export const metadata: Metadata = { title: 'Not found' };

/** An address that is no page at all. */
export default function NotFound() {
  return (
    <Door title="No such page" lead="The address may be mistyped, or what it names is gone. Nothing was changed.">
      <LinkButton href="/" kind="action">
        Go to the start
      </LinkButton>
    </Door>
  );
}
