import clsx from 'clsx';
import type { ReactNode, TdHTMLAttributes, ThHTMLAttributes } from 'react';

/** A real table on white, ruled by hairlines; scrolls inside its own frame when it must. */
export function Table({ caption, children, className }: { caption: string; children: ReactNode; className?: string }) {
  return (
    <section className={clsx('overflow-x-auto', className)} aria-label={caption}>
      <table className="w-full border-collapse bg-white text-left">
        <caption className="sr-only">{caption}</caption>
        {children}
      </table>
    </section>
  );
}

/** Head cell; `numeric` sets it flush right over its figures. */
export function Th({ numeric, className, ...rest }: ThHTMLAttributes<HTMLTableCellElement> & { numeric?: boolean }) {
  return (
    <th
      scope="col"
      {...rest}
      className={clsx(
        'border-b-2 border-ink px-3 py-2 font-semibold whitespace-nowrap text-mute',
        numeric && 'text-right',
        className,
      )}
    />
  );
}

/** Body cell. */
export function Td({ numeric, className, ...rest }: TdHTMLAttributes<HTMLTableCellElement> & { numeric?: boolean }) {
  return <td {...rest} className={clsx('border-b border-line px-3 py-2 align-baseline', numeric && 'text-right', className)} />;
}
