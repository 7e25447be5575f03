import clsx from 'clsx';
import Link from 'next/link';
import type { ReactNode } from 'react';

/** Width and margins of a work page. */
export function Page({ children, narrow = false }: { children: ReactNode; narrow?: boolean }) {
  return (
    <main id="main" className={clsx('mx-auto w-full px-4 py-6 lg:px-7', narrow ? 'max-w-3xl' : 'max-w-[100rem]')}>
      {children}
    </main>
  );
}

/** Trail, the one h1, what stands beside it and the page's actions. */
export function PageHeader({
  trail = [],
  title,
  aside,
  actions,
}: {
  trail?: { label: string; href?: string }[];
  title: ReactNode;
  aside?: ReactNode;
  actions?: ReactNode;
}) {
  return (
    <header className="mb-5">
      {trail.length > 0 ? (
        <nav aria-label="Breadcrumb" className="mb-1 text-mute">
          {trail.map((step, index) => (
            <span key={step.label}>
              {index > 0 ? ' / ' : ''}
              {step.href ? (
                <Link href={step.href} className="underline decoration-line underline-offset-4 hover:decoration-ink">
                  {step.label}
                </Link>
              ) : (
                step.label
              )}
            </span>
          ))}
        </nav>
      ) : null}
      <div className="flex flex-wrap items-end justify-between gap-x-8 gap-y-3">
        <div className="flex flex-wrap items-end gap-x-8 gap-y-2">
          <h1 className="text-[1.75rem] lg:text-[1.85rem]">{title}</h1>
          {aside}
        </div>
        {actions ? <div className="flex flex-wrap gap-2">{actions}</div> : null}
      </div>
    </header>
  );
}

/** A big numeral with its unit under it. */
export function Figure({ value, label }: { value: ReactNode; label: ReactNode }) {
  return (
    <div className="leading-tight">
      <div className="font-display font-bold text-[1.5rem]">{value}</div>
      <div className="text-mute">{label}</div>
    </div>
  );
}

/** Paper with a hairline. */
export function Panel({ children, className, ...rest }: { children: ReactNode; className?: string; 'aria-label'?: string }) {
  return (
    <section {...rest} className={clsx('border border-line bg-paper p-4', className)}>
      {children}
    </section>
  );
}

const NOTICE = {
  info: 'border-slate bg-slate-light',
  attention: 'border-straw bg-straw-light',
  error: 'border-rust bg-rust-light',
  good: 'border-leaf bg-leaf-light',
} as const;

/** A message in the page's flow. Errors are announced. */
export function Notice({
  kind = 'info',
  title,
  children,
  className,
}: {
  kind?: keyof typeof NOTICE;
  title?: ReactNode;
  children?: ReactNode;
  className?: string;
}) {
  return (
    <div role={kind === 'error' ? 'alert' : 'status'} className={clsx('border-l-4 px-4 py-3', NOTICE[kind], className)}>
      {title ? <p className="font-display font-bold text-[1.1em]">{title}</p> : null}
      {children}
    </div>
  );
}

const TAG = {
  plain: 'border-line bg-white text-ink',
  good: 'border-leaf bg-leaf-light text-ink',
  attention: 'border-straw bg-straw-light text-ink',
  error: 'border-rust bg-rust-light text-ink',
  bloom: 'border-bloom bg-bloom-light text-ink',
} as const;

/** A word in a box: a state, a release. */
export function Tag({ kind = 'plain', children }: { kind?: keyof typeof TAG; children: ReactNode }) {
  return <span className={clsx('inline-block border px-2 py-0.5 text-[0.88em] whitespace-nowrap', TAG[kind])}>{children}</span>;
}

/** What goes on an empty page, and the button that fills it. */
export function EmptyState({ title, children, action }: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div className="border border-dashed border-line bg-paper px-6 py-10 text-center">
      <h2 className="text-xl">{title}</h2>
      {children ? <div className="mx-auto mt-2 max-w-prose text-mute">{children}</div> : null}
      {action ? <div className="mt-5 flex justify-center gap-2">{action}</div> : null}
    </div>
  );
}

/** Small type where the figure stands; never behind a link. */
export function Caution({ children, className }: { children: ReactNode; className?: string }) {
  return <p className={clsx('text-mute text-[0.9em]', className)}>{children}</p>;
}
