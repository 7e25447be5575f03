'use client';

import clsx from 'clsx';
import Link from 'next/link';
import { usePathname, useSearchParams } from 'next/navigation';
import { useEffect, useState } from 'react';
import { PLACES, type Place } from '@/features/accounts/places';
import type { Role } from '../model';
import { AccountMenu } from './account-menu';
import { Brand } from './brand';

export interface BarViewer {
  role: Role;
  name: string;
  season: number;
  dealershipName: string;
}

export interface BarOperation {
  id: string;
  name: string;
}

/** The operation an address is about: `?operation=ID`, `/growers/ID` or `/plans/ID/…`; `null` when it names none. */
export function operationInAddress(path: string, asked: string | null): string | null {
  return asked ?? /^\/(?:growers|plans)\/([^/]+)/.exec(path)?.[1] ?? null;
}

/** Pages that look at the first operation when their address names none. */
const LOOK_AT_THE_FIRST = /^\/(fields|fields\/import|soil\/import)$/;

/** The operation being looked at, kept while pages that name none are visited (a field, the line-up). */
function useOperationLookedAt(path: string, operations: BarOperation[]): BarOperation | null {
  const named = operationInAddress(path, useSearchParams().get('operation'));
  const [last, setLast] = useState<string | null>(null);
  useEffect(() => {
    if (named !== null) setLast(named);
  }, [named]);
  const id = named ?? (LOOK_AT_THE_FIRST.test(path) ? operations[0]?.id : last);
  if (operations.length === 1) return operations[0] ?? null;
  return operations.find((one) => one.id === id) ?? null;
}

/** Places that are about one operation keep it in their address. */
function hrefOf(place: Place, operation: BarOperation | null, season: number): string {
  if (!operation) return place.href;
  if (place.href === '/fields') return `/fields?operation=${operation.id}`;
  if (place.href === '/plans') return `/plans/${operation.id}/${season}`;
  return place.href;
}

/** Logo, places, the operation and season being looked at, and the account. On a phone the places are in the menu. */
export function TopBar({
  viewer,
  operations,
  signOut,
  showOutbox,
}: {
  viewer: BarViewer;
  operations: BarOperation[];
  signOut: () => Promise<void>;
  showOutbox: boolean;
}) {
  const path = usePathname();
  const operation = useOperationLookedAt(path, operations);
  const places = PLACES.filter((place) => place.roles.includes(viewer.role)).map((place) => ({
    label: place.label,
    here: place.match.test(path),
    href:
      operations.length > 1 && viewer.role !== 'grower' && place.href === '/plans'
        ? '/plans'
        : hrefOf(place, operation, viewer.season),
  }));
  return (
    <header className="no-print sticky top-0 z-30 bg-hilum text-paper">
      <div className="flex h-14 items-center gap-7 px-4 lg:px-6">
        <Brand />
        <nav aria-label="Places" className="hidden h-full items-stretch gap-6 md:flex">
          {places.map((place) => (
            <Link
              key={place.label}
              href={place.href}
              aria-current={place.here ? 'page' : undefined}
              className={clsx(
                'flex items-center border-y-3 border-t-transparent focus-visible:outline-white',
                place.here ? 'border-b-bar-bloom text-white' : 'border-b-transparent text-bar-mute hover:text-white',
              )}
            >
              {place.label}
            </Link>
          ))}
        </nav>
        <div className="ml-auto flex min-w-0 items-center gap-4 text-bar-mute lg:gap-6">
          <p className="truncate text-[0.86rem] lg:text-[0.9rem]">
            {operation?.name ?? viewer.dealershipName}
            <span className="max-sm:hidden">
              <span className="px-2" aria-hidden="true">
                ·
              </span>
              {viewer.season} season
            </span>
          </p>
          <AccountMenu viewer={viewer} places={places} path={path} signOut={signOut} showOutbox={showOutbox} />
        </div>
      </div>
    </header>
  );
}
