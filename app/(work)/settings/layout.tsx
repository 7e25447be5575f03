import type { ReactNode } from 'react';
import { SettingsNav } from '@/features/accounts/components/settings-nav';
import { settingsOf } from '@/features/accounts/places';
import { requireViewer } from '@/features/accounts/viewer';
import { environment } from '@/lib/env';

export default async function SettingsLayout({ children }: { children: ReactNode }) {
  const viewer = await requireViewer();
  const pages = settingsOf(viewer.role, environment().showOutbox);
  return (
    <>
      {pages.length > 1 ? <SettingsNav pages={pages} /> : null}
      {children}
    </>
  );
}
