import type { ReactNode } from 'react';
import { cx } from '#src/lib/cx.ts';
import { useTitle } from '#src/lib/use-title.ts';

type PageProps = {
  /** Shown as the page's heading and in the tab of the browser. */
  title: string;
  /** Beside the heading: state in a few words. */
  about?: ReactNode;
  actions?: ReactNode;
  /** `text`: a column to read; `wide`: all the room there is. */
  width?: 'text' | 'usual' | 'wide';
  children: ReactNode;
};

const widths = { text: 'max-w-2xl', usual: 'max-w-6xl', wide: 'max-w-none' };

export function Page({ title, about, actions, width = 'usual', children }: PageProps) {
  useTitle(title);
  return (
    <div className={cx('mx-auto flex w-full flex-col gap-4 px-4 py-4 sm:px-5', widths[width])}>
      <header className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2">
        <div className="flex min-w-0 flex-wrap items-baseline gap-x-4 gap-y-1">
          <h1>{title}</h1>
          {about && <div className="text-muted">{about}</div>}
        </div>
        {actions && <div className="flex flex-wrap items-center gap-2">{actions}</div>}
      </header>
      {children}
    </div>
  );
}
