import type { ReactNode } from 'react';
import { Brand } from '@/features/accounts/components/brand';

/** Pages for people who are not signed in. */
export default function PublicLayout({ children }: { children: ReactNode }) {
  return (
    <>
      <a href="#main" className="sr-only focus:not-sr-only focus:absolute focus:z-50 focus:bg-white focus:p-3">
        Skip to the page
      </a>
      <header className="no-print bg-hilum text-paper">
        <div className="flex h-14 items-center px-4 lg:px-6">
          <Brand />
        </div>
      </header>
      {children}
    </>
  );
}
