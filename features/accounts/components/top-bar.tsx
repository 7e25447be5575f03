'use client';

import clsx from 'clsx';
import Image from 'next/image';
import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { DropdownMenu } from 'radix-ui';
import { PLACES } from '@/features/accounts/places';
import type { Role } from '../model';

export interface BarViewer {
  role: Role;
  name: string;
  season: number;
  dealershipName: string;
}

const MENU_ITEM =
  'flex min-h-11 w-full items-center px-4 text-left text-base outline-none data-[highlighted]:bg-bloom-light lg:min-h-9 lg:text-sm';

/** Logo, places, season and account. On a phone the places are in the menu. */
export function TopBar({ viewer, signOut }: { viewer: BarViewer; signOut: () => Promise<void> }) {
  const path = usePathname();
  const places = PLACES.filter((place) => place.roles.includes(viewer.role));
  return (
    <header className="no-print sticky top-0 z-30 bg-hilum text-paper">
      <div className="flex h-14 items-center gap-7 px-4 lg:px-6">
        <Link href="/" className="flex items-center gap-2 font-display font-bold text-xl">
          <Image src="/hilum.svg" alt="" width={26} height={26} unoptimized />
          Hilum
        </Link>
        <nav aria-label="Places" className="hidden h-full items-stretch gap-6 md:flex">
          {places.map((place) => {
            const here = place.match.test(path);
            return (
              <Link
                key={place.href}
                href={place.href}
                aria-current={here ? 'page' : undefined}
                className={clsx(
                  'flex items-center border-b-2 pt-0.5',
                  here ? 'border-[#b79ad9] text-white' : 'border-transparent text-[#d6cdbd] hover:text-white',
                )}
              >
                {place.label}
              </Link>
            );
          })}
        </nav>
        <div className="ml-auto flex items-center gap-4 text-[#d6cdbd]">
          <span className="hidden sm:inline">
            {viewer.dealershipName} · {viewer.season} season
          </span>
          <AccountMenu viewer={viewer} places={places} path={path} signOut={signOut} />
        </div>
      </div>
    </header>
  );
}

function AccountMenu({
  viewer,
  places,
  path,
  signOut,
}: {
  viewer: BarViewer;
  places: readonly { label: string; href: string; match: RegExp }[];
  path: string;
  signOut: () => Promise<void>;
}) {
  const settings =
    viewer.role === 'manager'
      ? [
          { label: 'People', href: '/settings/people' },
          { label: 'Maturity zones', href: '/settings/zones' },
          { label: 'Placement rules', href: '/settings/rules' },
          { label: 'Weather stations', href: '/settings/stations' },
          { label: 'Audit trail', href: '/settings/audit' },
        ]
      : viewer.role === 'rep'
        ? [{ label: 'People', href: '/settings/people' }]
        : [];
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger className="flex min-h-11 items-center gap-2 px-1 text-paper" aria-label={`Menu of ${viewer.name}`}>
        <span className="hidden md:inline">{viewer.name}</span>
        <svg width="18" height="14" viewBox="0 0 18 14" aria-hidden="true" className="md:hidden">
          <path d="M0 1h18M0 7h18M0 13h18" stroke="currentColor" strokeWidth="2" />
        </svg>
        <svg width="10" height="6" viewBox="0 0 10 6" aria-hidden="true" className="hidden md:block">
          <path d="M1 1l4 4 4-4" stroke="currentColor" strokeWidth="1.5" fill="none" />
        </svg>
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content align="end" sideOffset={4} className="z-50 min-w-60 border border-ink bg-paper py-1 text-ink">
          <DropdownMenu.Label className="px-4 py-2 text-mute text-sm">
            {viewer.name}, {viewer.role}
            <br />
            {viewer.dealershipName} · {viewer.season} season
          </DropdownMenu.Label>
          <div className="border-line border-t md:hidden">
            {places.map((place) => (
              <DropdownMenu.Item key={place.href} asChild>
                <Link href={place.href} className={clsx(MENU_ITEM, place.match.test(path) && 'font-bold')}>
                  {place.label}
                </Link>
              </DropdownMenu.Item>
            ))}
          </div>
          {settings.length > 0 ? (
            <div className="border-line border-t">
              {settings.map((one) => (
                <DropdownMenu.Item key={one.href} asChild>
                  <Link href={one.href} className={MENU_ITEM}>
                    {one.label}
                  </Link>
                </DropdownMenu.Item>
              ))}
            </div>
          ) : null}
          <div className="border-line border-t">
            <DropdownMenu.Item asChild>
              <Link href="/settings/account" className={MENU_ITEM}>
                My account
              </Link>
            </DropdownMenu.Item>
            <DropdownMenu.Item className={clsx(MENU_ITEM, 'cursor-pointer')} onSelect={() => void signOut()}>
              Sign out
            </DropdownMenu.Item>
          </div>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
