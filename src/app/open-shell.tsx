import { Link, Outlet } from 'react-router-dom';
import { Mark } from '#src/ui/mark.tsx';
import { paths } from './paths.ts';

/** Around pages that anybody may read, signed in or not. */
export function Component() {
  return (
    <>
      <header className="border-b border-line bg-surface px-5">
        <Link to={paths.home()} className="inline-flex h-13 items-center gap-3 text-base font-bold">
          <Mark />
          Ovenbird
        </Link>
      </header>
      <main>
        <Outlet />
      </main>
    </>
  );
}
