import { useEffect } from 'react';
import { isRouteErrorResponse, Link, useLocation, useRouteError } from 'react-router-dom';
import { Button } from '#src/ui/button.tsx';
import { ErrorNote } from '#src/ui/error-note.tsx';
import { Page } from '#src/ui/page.tsx';
import { paths } from './paths.ts';

export function NotFound() {
  const { pathname } = useLocation();
  return (
    <Page title="There is nothing here" width="text">
      <p>
        No page has the address <code className="wrap-anywhere">{pathname}</code>. It may have been typed wrong, or the
        link is an old one.
      </p>
      <Button asChild look="primary" className="self-start">
        <Link to={paths.home()}>Go to your start page</Link>
      </Button>
    </Page>
  );
}

/** A page that failed to load or to draw. The shell around it stands, so that there is a way on. */
export function RouteError() {
  const error = useRouteError();
  const isOutdated = isMissingPiece(error);
  useEffect(() => {
    if (isOutdated) reloadOnce();
  }, [isOutdated]);
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFound />;
  return (
    <Page title="This page could not be shown" width="text">
      {isOutdated ? (
        <p role="alert">A piece of the page could not be loaded. There may be a newer version, or no network.</p>
      ) : (
        <ErrorNote error={error} />
      )}
      <div className="flex flex-wrap gap-2">
        <Button look="primary" onClick={() => location.reload()}>
          Reload
        </Button>
        <Button asChild>
          <Link to={paths.home()}>Go to your start page</Link>
        </Button>
      </div>
    </Page>
  );
}

/** A release takes the old pieces away; a page that was open before it asks for them in vain. */
const isMissingPiece = (error: unknown): boolean =>
  error instanceof TypeError && /dynamically imported module|module script|preload/i.test(error.message);

const key = 'ovenbird.reloaded';
function reloadOnce(): void {
  try {
    const last = Number(sessionStorage.getItem(key) ?? 0);
    if (Date.now() - last < 60_000) return;
    sessionStorage.setItem(key, String(Date.now()));
  } catch {
    return;
  }
  if (navigator.onLine) location.reload();
}
