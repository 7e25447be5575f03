import Image from 'next/image';
import Link from 'next/link';
import type { ReactNode } from 'react';

/** Pages for people who are not signed in. */
export default function PublicLayout({ children }: { children: ReactNode }) {
  return (
    <>
      <header className="bg-hilum text-paper">
        <div className="mx-auto flex max-w-[100rem] items-center px-4 py-3 lg:px-7">
          <Link href="/" className="flex items-center gap-2 font-display font-bold text-xl">
            <Image src="/hilum.svg" alt="" width={26} height={26} unoptimized />
            Hilum
          </Link>
        </div>
      </header>
      {children}
    </>
  );
}
