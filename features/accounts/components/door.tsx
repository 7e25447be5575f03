import type { ReactNode } from 'react';

/** The frame of sign-in, invitation and new password: one narrow column, the h1 and what is said under it. */
export function Door({ title, lead, children }: { title: string; lead?: ReactNode; children: ReactNode }) {
  return (
    <main id="main" className="mx-auto w-full max-w-[27rem] px-4 pt-8 pb-16 lg:pt-16">
      <div className="border border-ink/60 bg-paper px-5 pt-6 pb-7 sm:px-7">
        <div className="mb-5 border-ink border-b-2 pb-3">
          <h1 className="text-[1.9rem]">{title}</h1>
          {lead ? <div className="mt-1 break-words text-mute">{lead}</div> : null}
        </div>
        {children}
      </div>
    </main>
  );
}
