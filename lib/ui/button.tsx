import clsx from 'clsx';
import Link from 'next/link';
import type { ButtonHTMLAttributes, ReactNode } from 'react';

export type ButtonKind = 'action' | 'plain' | 'quiet' | 'danger';

const KINDS: Record<ButtonKind, string> = {
  action: 'bg-bloom text-white border-bloom hover:bg-bloom-deep',
  plain: 'bg-white text-ink border-ink hover:bg-hull',
  quiet: 'bg-transparent text-ink border-transparent underline decoration-line underline-offset-4 hover:decoration-ink',
  danger: 'bg-white text-rust-deep border-rust hover:bg-rust-light',
};

/** Classes of a button, for elements that must look like one. */
export function buttonClass(kind: ButtonKind = 'plain', small = false): string {
  return clsx(
    'inline-flex items-center justify-center gap-2 border font-semibold whitespace-nowrap disabled:opacity-50 disabled:cursor-not-allowed',
    small ? 'min-h-11 px-3 lg:min-h-8 lg:px-2.5 text-[0.95em]' : 'min-h-11 px-4 lg:min-h-9',
    KINDS[kind],
  );
}

/** A button. `pending` disables it and says so to a screen reader. */
export function Button({
  kind = 'plain',
  small = false,
  pending = false,
  className,
  children,
  ...rest
}: ButtonHTMLAttributes<HTMLButtonElement> & { kind?: ButtonKind; small?: boolean; pending?: boolean }) {
  return (
    <button
      type="button"
      {...rest}
      disabled={pending || rest.disabled}
      aria-busy={pending || undefined}
      className={clsx(buttonClass(kind, small), className)}
    >
      {children}
    </button>
  );
}

/** A link that looks like a button. */
export function LinkButton({
  href,
  kind = 'plain',
  small = false,
  className,
  children,
  download,
  prefetch,
}: {
  href: string;
  kind?: ButtonKind;
  small?: boolean;
  className?: string;
  children: ReactNode;
  download?: boolean;
  prefetch?: boolean;
}) {
  if (download) {
    return (
      <a href={href} download className={clsx(buttonClass(kind, small), className)}>
        {children}
      </a>
    );
  }
  return (
    <Link href={href} prefetch={prefetch} className={clsx(buttonClass(kind, small), className)}>
      {children}
    </Link>
  );
}
