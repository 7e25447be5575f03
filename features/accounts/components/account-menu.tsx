'use client';

import clsx from 'clsx';
import Link from 'next/link';
import { DropdownMenu } from 'radix-ui';
import { settingsOf } from '@/features/accounts/places';
import type { BarViewer } from './top-bar';

const ITEM =
  'flex min-h-11 w-full items-center border-l-4 border-transparent px-4 text-left text-base outline-none data-[highlighted]:bg-bloom-light lg:min-h-9 lg:text-sm';

/** Who is signed in, the settings open to them and sign out; on a phone the places too. */
export function AccountMenu({
  viewer,
  places,
  path,
  signOut,
  showOutbox,
}: {
  viewer: BarViewer;
  places: { label: string; href: string; here: boolean }[];
  path: string;
  signOut: () => Promise<void>;
  showOutbox: boolean;
}) {
  const settings = settingsOf(viewer.role, showOutbox);
  return (
    <DropdownMenu.Root>
      <DropdownMenu.Trigger
        className="flex min-h-11 min-w-11 shrink-0 items-center justify-end gap-2 text-paper focus-visible:outline-white"
        aria-label={`Menu of ${viewer.name}`}
      >
        <span className="hidden max-w-44 truncate md:inline">{viewer.name}</span>
        <svg width="20" height="14" viewBox="0 0 20 14" aria-hidden="true" className="md:hidden">
          <path d="M0 1h20M0 7h20M0 13h20" stroke="currentColor" strokeWidth="2" />
        </svg>
        <svg width="10" height="6" viewBox="0 0 10 6" aria-hidden="true" className="hidden md:block">
          <path d="M1 1l4 4 4-4" stroke="currentColor" strokeWidth="1.5" fill="none" />
        </svg>
      </DropdownMenu.Trigger>
      <DropdownMenu.Portal>
        <DropdownMenu.Content
          align="end"
          sideOffset={6}
          className="z-50 max-h-[calc(100dvh-4rem)] min-w-64 overflow-y-auto border border-ink bg-paper py-1 text-ink"
        >
          <DropdownMenu.Label className="px-4 py-2">
            <span className="block font-semibold">{viewer.name}</span>
            <span className="block text-mute text-sm">
              {viewer.role[0]?.toUpperCase()}
              {viewer.role.slice(1)}, {viewer.dealershipName}
            </span>
            <span className="block text-mute text-sm">{viewer.season} season</span>
          </DropdownMenu.Label>
          <DropdownMenu.Group className="border-line border-t py-1 md:hidden">
            {places.map((place) => (
              <DropdownMenu.Item key={place.label} asChild>
                <Link href={place.href} className={clsx(ITEM, place.here && 'border-l-bloom font-bold')}>
                  {place.label}
                </Link>
              </DropdownMenu.Item>
            ))}
          </DropdownMenu.Group>
          <DropdownMenu.Group className="border-line border-t py-1">
            {settings.map((one) => (
              <DropdownMenu.Item key={one.href} asChild>
                <Link href={one.href} className={clsx(ITEM, path === one.href && 'border-l-bloom font-bold')}>
                  {one.label}
                </Link>
              </DropdownMenu.Item>
            ))}
          </DropdownMenu.Group>
          <DropdownMenu.Group className="border-line border-t pt-1">
            <DropdownMenu.Item className={clsx(ITEM, 'cursor-pointer')} onSelect={() => void signOut()}>
              Sign out
            </DropdownMenu.Item>
          </DropdownMenu.Group>
        </DropdownMenu.Content>
      </DropdownMenu.Portal>
    </DropdownMenu.Root>
  );
}
