import { useQuery } from '@tanstack/react-query';
import { BarChart3, CalendarClock, ClipboardList, SprayCan, Thermometer } from 'lucide-react';
import { NavLink, useLocation } from 'react-router-dom';
import { firstStepsQuery } from '#src/features/shop/first-steps/first-steps-query.ts';
import { cx } from '#src/lib/cx.ts';
import { may, useShop } from '#src/lib/session.ts';
import { paths } from './paths.ts';
import { useSetUpPath } from './use-set-up-path.ts';

function usePlaces() {
  const { role } = useShop();
  return [
    { to: paths.day(), label: 'Booth day', Icon: CalendarClock, seen: true },
    { to: paths.jobs(), label: 'Jobs', Icon: ClipboardList, seen: true },
    { to: paths.bench(), label: 'Bench', Icon: SprayCan, seen: may.workStages(role) },
    { to: paths.cure(), label: 'Cure desk', Icon: Thermometer, seen: may.workStages(role) },
    { to: paths.use(), label: 'Booth use', Icon: BarChart3, seen: may.seeUse(role) },
  ].filter((place) => place.seen);
}

export function TopNav() {
  return (
    <nav aria-label="Main" className="hidden h-full items-stretch gap-4 sm:flex">
      {usePlaces().map(({ to, label }) => (
        <NavLink
          key={to}
          to={to}
          className={({ isActive }) =>
            cx(
              'flex items-center border-b-2 pt-0.5 text-[0.8125rem] font-semibold whitespace-nowrap',
              isActive ? 'border-ember text-ink' : 'border-transparent text-muted hover:text-ink',
            )
          }
        >
          {label}
        </NavLink>
      ))}
      <SetUpLink />
    </nav>
  );
}

/** All pages below /shop belong to it. On a phone it is in the account menu: the bar has room for daily things only. */
function SetUpLink() {
  const to = useSetUpPath();
  const { role, id } = useShop();
  const left = useStepsLeft(id, may.setUp(role));
  const isActive = useLocation().pathname.startsWith(paths.firstSteps());
  if (!may.plan(role)) return null;
  return (
    <NavLink
      to={to}
      aria-current={isActive ? 'page' : undefined}
      className={cx(
        'flex items-center border-b-2 pt-0.5 text-[0.8125rem] font-semibold whitespace-nowrap',
        isActive ? 'border-ember text-ink' : 'border-transparent text-muted hover:text-ink',
      )}
    >
      {left === null ? 'Set-up' : `Set-up ${left}`}
    </NavLink>
  );
}

/** `3/5` of the first steps of a shop that has no plan yet; null once it has. */
function useStepsLeft(shopId: string, isOwner: boolean): string | null {
  const { data } = useQuery({ ...firstStepsQuery(shopId), enabled: isOwner, retry: false, staleTime: 300_000 });
  const done = data?.steps.filter((one) => one.done).length ?? 0;
  return data === undefined || done === data.steps.length ? null : `${done}/${data.steps.length}`;
}

/** On a phone the thumb is at the bottom. */
export function BottomNav() {
  return (
    <nav
      aria-label="Main"
      className="fixed inset-x-0 bottom-0 z-30 flex border-t border-line bg-surface pb-[env(safe-area-inset-bottom)] sm:hidden print:hidden"
    >
      {usePlaces().map(({ to, label, Icon }) => (
        <NavLink
          key={to}
          to={to}
          className={({ isActive }) =>
            cx(
              'flex min-h-14 flex-1 flex-col items-center justify-center gap-0.5 border-t-2 text-xs font-semibold -outline-offset-2',
              isActive ? 'border-ember text-ink' : 'border-transparent text-muted',
            )
          }
        >
          <Icon size={20} aria-hidden="true" />
          {label}
        </NavLink>
      ))}
    </nav>
  );
}
