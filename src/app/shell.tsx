import { useEffect } from 'react';
import { Link, Outlet, useNavigation } from 'react-router-dom';
import { cx } from '#src/lib/cx.ts';
import { Mark } from '#src/ui/mark.tsx';
import { AccountMenu } from './account-menu.tsx';
import { ConnectionBanner } from './connection-banner.tsx';
import { KeyList } from './key-list.tsx';
import { BottomNav, TopNav } from './nav.tsx';
import { paths } from './paths.ts';
import { ShopSwitch } from './shop-switch.tsx';

/** Top bar, page, and on phones a bar at the bottom. `bay`: everything that is pressed is larger. */
export function Shell({ place }: { place: 'desk' | 'bay' }) {
  useEffect(() => {
    // On the root element, since dialogs and menus are drawn outside of the shell.
    document.documentElement.dataset['place'] = place;
    return () => {
      delete document.documentElement.dataset['place'];
    };
  }, [place]);
  return (
    <div className="flex min-h-dvh flex-col">
      <a
        href="#page"
        className="sr-only rounded bg-surface px-3 py-2 font-semibold focus:not-sr-only focus:absolute focus:top-2 focus:left-2 focus:z-50"
      >
        Skip to the page
      </a>
      <header className="relative flex h-13 items-center gap-5 border-b border-line bg-surface px-4 sm:px-5 print:hidden">
        <Link to={paths.home()} className="flex shrink-0 items-center gap-3 text-base font-bold">
          <Mark />
          <span className="max-md:sr-only">Ovenbird</span>
        </Link>
        <TopNav />
        <div className="ml-auto flex min-w-0 items-center gap-1">
          <ShopSwitch />
          <AccountMenu />
        </div>
        <GoingBar />
      </header>
      <ConnectionBanner />
      <main id="page" tabIndex={-1} className={cx('grow outline-none max-sm:pb-20 print:pb-0')}>
        <Outlet />
      </main>
      <BottomNav />
      <KeyList />
    </div>
  );
}

/** A page that takes a while to load shows that it was asked for. */
function GoingBar() {
  const isGoing = useNavigation().state !== 'idle';
  return (
    <div role="status" className="absolute inset-x-0 -bottom-px">
      {isGoing && (
        <div className="breathe h-0.5 bg-ember">
          <span className="sr-only">Loading the page</span>
        </div>
      )}
    </div>
  );
}
