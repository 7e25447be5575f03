import clsx from 'clsx';
import type { ReactNode, TdHTMLAttributes, ThHTMLAttributes } from 'react';

const STACKED =
  'max-sm:[&_thead]:sr-only max-sm:[&_tr]:block max-sm:[&_tr]:border-b max-sm:[&_tr]:border-line max-sm:[&_tr]:py-2 max-sm:[&_td]:block max-sm:[&_td]:border-0 max-sm:[&_td]:py-1 max-sm:[&_td]:text-left';

/** A real table on white, ruled by hairlines; scrolls inside its own frame when it must. */
export function Table({
  caption,
  children,
  className,
  stacked = false,
}: {
  caption: string;
  children: ReactNode;
  className?: string;
  /** On a phone each row stands as a block, one cell under the other. */
  stacked?: boolean;
}) {
  return (
    <section
      className={clsx('relative overflow-x-auto', stacked && STACKED, className)}
      aria-label={caption}
      tabIndex={stacked ? undefined : 0}
    >
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
