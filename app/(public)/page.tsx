import type { Metadata } from 'next';
import { redirect } from 'next/navigation';
import { Landing } from '@/features/accounts/components/landing';
import { startOf } from '@/features/accounts/places';
import { currentViewer } from '@/features/accounts/viewer';
import { FACTOR_COLOURS } from '@/features/placement/components/factor-colours';

export const metadata: Metadata = { title: { absolute: 'Hilum: soybean placement' } };

/** Signed out: what Hilum is. Signed in: the role's own start. */
export default async function HomePage() {
  const viewer = await currentViewer();
  if (viewer) redirect(startOf(viewer.role));
  return <Landing colours={FACTOR_COLOURS} />;
}
