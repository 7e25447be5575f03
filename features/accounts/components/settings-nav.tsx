'use client';

import clsx from 'clsx';
import Link from 'next/link';
import { usePathname } from 'next/navigation';

/** The pages of the settings, the present one underlined; runs sideways within itself on a phone. */
export function SettingsNav({ pages }: { pages: { label: string; href: string }[] }) {
  const path = usePathname();
  return (
    <nav aria-label="Settings" className="no-print border-line border-b bg-paper">
      <ul className="flex gap-6 overflow-x-auto px-4 lg:px-7">
        {pages.map((page) => (
          <li key={page.href} className="shrink-0">
            <Link
              href={page.href}
              aria-current={path === page.href ? 'page' : undefined}
              className={clsx(
                'flex min-h-11 items-center border-y-3 border-t-transparent',
                path === page.href ? 'border-b-bloom font-semibold' : 'border-b-transparent text-mute hover:text-ink',
              )}
            >
              {page.label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
