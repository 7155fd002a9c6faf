import type { ComponentProps, ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';

/**
 * A table with a head that stays in sight and its own sideways scrolling, which the keyboard reaches (`relative`: what is
 * only read out would otherwise widen the page). Children: ordinary
 * `<thead>` and `<tbody>` with Th and Td.
 */
export function Table({ label, children, className }: { label: string; children: ReactNode; className?: string }) {
  return (
    <div
      role="region"
      aria-label={label}
      tabIndex={0}
      className={cx('card relative max-w-full overflow-auto', className)}
    >
      <table className="w-full border-collapse text-left">
        <caption className="sr-only">{label}</caption>
        {children}
      </table>
    </div>
  );
}

type Sort = 'ascending' | 'descending' | 'none';
type ThProps = ComponentProps<'th'> & { number?: boolean; sort?: Sort; onSort?: () => void };

/** A head cell; with `onSort` a button that says how the column is sorted. */
export function Th({ number, sort, onSort, className, children, ...rest }: ThProps) {
  return (
    <th
      scope="col"
      aria-sort={sort}
      className={cx(
        'sticky top-0 z-10 bg-surface px-3 py-2 text-xs font-semibold whitespace-nowrap text-muted shadow-[inset_0_-1px_0_var(--line)]',
        number && 'text-right',
        className,
      )}
      {...rest}
    >
      {onSort ? (
        <button
          type="button"
          onClick={onSort}
          className="-mx-1.5 inline-flex min-h-6 items-center gap-1 rounded-sm px-1.5 font-semibold hover:text-ink"
        >
          {children}
          <span aria-hidden="true" className={sort === 'none' || sort === undefined ? 'opacity-30' : 'text-ink'}>
            {sort === 'descending' ? '↓' : '↑'}
          </span>
        </button>
      ) : (
        children
      )}
    </th>
  );
}

type TdProps = ComponentProps<'td'> & { number?: boolean };
export const Td = ({ number, className, ...rest }: TdProps) => (
  <td
    className={cx('border-t border-line px-3 py-2 align-middle', number && 'figures text-right', className)}
    {...rest}
  />
);
