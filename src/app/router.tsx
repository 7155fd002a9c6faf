import type { QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, redirect, type LoaderFunctionArgs, type RouteObject } from 'react-router-dom';
import { meQuery } from '#src/lib/session.ts';
import { paths } from './paths.ts';
import { NotFound, RouteError } from './error-screens.tsx';
import { PageSkeleton } from './page-skeleton.tsx';

const atDesk: RouteObject[] = [
  { path: '/day', lazy: () => import('#src/features/day/day-page.tsx') },
  { path: '/jobs', lazy: () => import('#src/features/jobs/jobs-page.tsx') },
  { path: '/jobs/new', lazy: () => import('#src/features/jobs/new-job-page.tsx') },
  { path: '/jobs/:jobId', lazy: () => import('#src/features/jobs/job-page.tsx') },
  { path: '/cure', lazy: () => import('#src/features/cure/cure-page.tsx') },
  { path: '/use', lazy: () => import('#src/features/use/use-page.tsx') },
  { path: '/account', lazy: () => import('#src/features/account/account-page.tsx') },
  { path: '/shop/new', lazy: () => import('#src/features/shop/new-shop/new-shop-page.tsx') },
  {
    lazy: () => import('#src/features/shop/shop-layout.tsx'),
    children: [
      { path: '/shop', lazy: () => import('#src/features/shop/first-steps/first-steps-page.tsx') },
      { path: '/shop/places', lazy: () => import('#src/features/shop/places/places-page.tsx') },
      { path: '/shop/lamps', lazy: () => import('#src/features/shop/lamps/lamps-page.tsx') },
      { path: '/shop/hours', lazy: () => import('#src/features/shop/hours/hours-page.tsx') },
      { path: '/shop/upkeep', lazy: () => import('#src/features/shop/upkeep/upkeep-page.tsx') },
      { path: '/shop/settings', lazy: () => import('#src/features/shop/settings/settings-page.tsx') },
      { path: '/shop/people', lazy: () => import('#src/features/shop/people/people-page.tsx') },
      { path: '/shop/sheets', lazy: () => import('#src/features/shop/sheets/sheets-page.tsx') },
      { path: '/shop/sheets/new', lazy: () => import('#src/features/shop/sheets/new-sheet-page.tsx') },
      { path: '/shop/sheets/:sheetId', lazy: () => import('#src/features/shop/sheets/sheet-page.tsx') },
      { path: '/shop/coatings', lazy: () => import('#src/features/shop/coatings/coatings-page.tsx') },
      { path: '/shop/coatings/new', lazy: () => import('#src/features/shop/coatings/new-coating-page.tsx') },
      { path: '/shop/coatings/:coatingId', lazy: () => import('#src/features/shop/coatings/coating-page.tsx') },
      { path: '/shop/air', lazy: () => import('#src/features/shop/air/air-page.tsx') },
      { path: '/shop/keys', lazy: () => import('#src/features/shop/keys/keys-page.tsx') },
      { path: '/shop/members', lazy: () => import('#src/features/account/members-page.tsx') },
      { path: '/shop/letters', lazy: () => import('#src/features/account/letters-page.tsx') },
    ],
  },
  { path: '*', Component: NotFound },
];
const inBay: RouteObject[] = [{ path: '/bench', lazy: () => import('#src/features/bench/bench-page.tsx') }];
const atDoor: RouteObject[] = [
  { path: '/sign-in', lazy: () => import('#src/features/session/sign-in-page.tsx') },
  { path: '/forgotten', lazy: () => import('#src/features/session/forgotten-page.tsx') },
  { path: '/password-reset', lazy: () => import('#src/features/session/reset-page.tsx') },
  { path: '/sign-up', lazy: () => import('#src/features/session/sign-up-page.tsx') },
  { path: '/invitation', lazy: () => import('#src/features/session/invitation-page.tsx') },
];
const open: RouteObject[] = [
  { path: '/licences', lazy: () => import('#src/features/account/licences-page.tsx') },
  { path: '/mailbox', lazy: () => import('#src/features/account/mailbox-page.tsx') },
];

// A fault of one page leaves the shell around it standing.
const guarded = (children: RouteObject[]): RouteObject => ({ ErrorBoundary: RouteError, children });

/** Who is signed in is asked before any page that needs it; nobody leads to the sign-in and back again afterwards. */
const signedInOnly =
  (client: QueryClient) =>
  async ({ request }: LoaderFunctionArgs) => {
    const me = await client.ensureQueryData(meQuery);
    const { pathname, search, hash } = new URL(request.url);
    return me === null ? redirect(paths.signIn(pathname + search + hash)) : null;
  };

// Everything but this list comes in pieces, fetched side by side: who signs in does not wait for the booth day.
export const routes = (client: QueryClient): RouteObject[] => [
  {
    HydrateFallback: PageSkeleton,
    ErrorBoundary: RouteError,
    children: [
      { lazy: () => import('./front-door.tsx'), children: [guarded(atDoor)] },
      { lazy: () => import('./open-shell.tsx'), children: [guarded(open)] },
      {
        lazy: () => import('./signed-in.tsx'),
        loader: signedInOnly(client),
        // Asked once and then kept by the query cache; a change of page need not ask again.
        shouldRevalidate: () => false,
        children: [
          { path: '/', lazy: () => import('./home.tsx') },
          { lazy: () => import('./bay-shell.tsx'), children: [guarded(inBay)] },
          { lazy: () => import('./desk-shell.tsx'), children: [guarded(atDesk)] },
        ],
      },
    ],
  },
];

export const makeRouter = (client: QueryClient) => createBrowserRouter(routes(client));
