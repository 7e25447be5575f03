import type { ReactNode } from 'react';
import { signOut } from '@/features/accounts/actions';
import { TopBar } from '@/features/accounts/components/top-bar';
import { requireViewer } from '@/features/accounts/viewer';
import { operationsFor } from '@/features/growers/queries';
import { environment } from '@/lib/env';

/** Everything behind sign-in: one top bar over the page. */
export default async function WorkLayout({ children }: { children: ReactNode }) {
  const viewer = await requireViewer();
  const operations = await operationsFor(viewer);
  return (
    <>
      <a href="#main" className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-white focus:p-3">
        Skip to the page
      </a>
      <TopBar
        viewer={{ role: viewer.role, name: viewer.name, season: viewer.season, dealershipName: viewer.dealershipName }}
        operations={operations.map(({ id, name }) => ({ id, name }))}
        signOut={signOut}
        showOutbox={environment().showOutbox}
      />
      {children}
    </>
  );
}
