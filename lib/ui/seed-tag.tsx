import clsx from 'clsx';
import type { ReactNode } from 'react';

const CUT = '[clip-path:polygon(2.25rem_0,calc(100%-2.25rem)_0,100%_2.25rem,100%_100%,0_100%,0_2.25rem)]';

/** A printed seed tag: cut corners, a punched hole in its ring, a rule under the heading. */
export function SeedTag({
  heading,
  note,
  children,
  className,
}: {
  heading: ReactNode;
  note?: ReactNode;
  children: ReactNode;
  className?: string;
}) {
  return (
    <div className={clsx('relative', className)}>
      <svg viewBox="0 0 80 64" aria-hidden="true" className="-top-9 -translate-x-1/2 absolute left-1/2 z-10 h-16 w-20">
        <path d="M40 50C38 34 22 30 27 13c2-8 11-11 12-2 1 10-6 22-1 38" fill="none" stroke="#b99a55" strokeWidth="2" />
      </svg>
      <div className={clsx('bg-ink/60 p-px', CUT)}>
        <div className={clsx('bg-paper px-5 pt-5 pb-6 sm:px-7', CUT)}>
          <div
            aria-hidden="true"
            className="mx-auto mb-3 grid size-9 place-items-center rounded-full border border-straw bg-straw-light"
          >
            <span className="size-4 rounded-full border border-ink/50 bg-hull" />
          </div>
          <div className="mb-4 border-ink border-b-2 pb-2">
            <h2 className="text-2xl">{heading}</h2>
            {note ? <p className="text-mute">{note}</p> : null}
          </div>
          {children}
        </div>
      </div>
    </div>
  );
}
