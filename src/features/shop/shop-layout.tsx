import { useEffect, useRef } from 'react';
import { NavLink, Outlet, useLocation } from 'react-router-dom';
import { cx } from '#src/lib/cx.ts';
import { useShop } from '#src/lib/session.ts';
import { groups } from './sections.ts';

/** The pages of the set-up beside their list; on a phone the list is a strip above them that scrolls sideways. */
export function Component() {
  const { role } = useShop();
  const strip = useRef<HTMLElement>(null);
  const { pathname } = useLocation();
  // On a phone the page one is on may lie beyond the edge of the strip.
  useEffect(() => {
    // Braces: a browser may answer with a promise, which is no clean-up.
    strip.current?.querySelector('[aria-current]')?.scrollIntoView({ inline: 'center', block: 'nearest' });
  }, [pathname]);
  const seen = groups
    .map((group) => ({ ...group, sections: group.sections.filter((section) => section.seen(role)) }))
    .filter((group) => group.sections.length > 0);
  return (
    <div className="mx-auto flex w-full max-w-7xl flex-col lg:flex-row">
      <nav
        ref={strip}
        aria-label="Set-up"
        className="flex shrink-0 gap-4 overflow-x-auto border-b border-line px-4 lg:w-52 lg:flex-col lg:gap-5 lg:overflow-visible lg:border-0 lg:py-5 lg:pr-0 print:hidden"
      >
        {seen.map(({ title, sections }) => (
          <section key={title} aria-label={title} className="flex shrink-0 gap-1 lg:flex-col">
            <p className="px-2 text-xs font-semibold text-muted max-lg:hidden">{title}</p>
            {sections.map(({ to, label }) => (
              <NavLink
                key={to}
                to={to}
                // The first page's address begins all the others.
                end={to === '/shop'}
                className={({ isActive }) =>
                  cx(
                    'flex min-h-11 items-center border-b-2 px-2 text-[0.8125rem] font-semibold whitespace-nowrap lg:min-h-control lg:rounded lg:border-0',
                    isActive
                      ? 'border-ember text-ink lg:bg-surface'
                      : 'border-transparent text-muted hover:text-ink lg:hover:bg-surface',
                  )
                }
              >
                {label}
              </NavLink>
            ))}
          </section>
        ))}
      </nav>
      <div className="min-w-0 flex-1">
        <Outlet />
      </div>
    </div>
  );
}
