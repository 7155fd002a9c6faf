import { Link, Outlet } from 'react-router-dom';
import { Mark } from '#src/ui/mark.tsx';
import { paths } from './paths.ts';

/** Around the screens before one is in: the mark, one card, and what is always owed. */
export function Component() {
  return (
    <div className="flex min-h-dvh flex-col items-center px-4 py-8 sm:justify-center">
      <header className="mb-6 flex items-center gap-3">
        <Mark className="size-9" />
        <span className="text-xl font-bold">Ovenbird</span>
      </header>
      <main className="card w-full max-w-sm p-5 sm:p-6">
        <Outlet />
      </main>
      <footer className="mt-6 text-xs text-muted">
        <Link to={paths.licences()} className="link font-normal text-muted">
          Licences and cautions
        </Link>
      </footer>
    </div>
  );
}
