/** Every address of the program. `search` is what the page reads after the `?`. */
const withSearch = (path: string, search?: URLSearchParams | Record<string, string>): string => {
  const text = search === undefined ? '' : new URLSearchParams(search).toString();
  return text === '' ? path : `${path}?${text}`;
};
type Search = URLSearchParams | Record<string, string>;

export const paths = {
  home: () => '/',
  day: (search?: Search) => withSearch('/day', search),
  jobs: (search?: Search) => withSearch('/jobs', search),
  newJob: () => '/jobs/new',
  job: (jobId: string) => `/jobs/${jobId}`,
  bench: (search?: Search) => withSearch('/bench', search),
  use: (search?: Search) => withSearch('/use', search),
  cure: (search?: Search) => withSearch('/cure', search),
  account: () => '/account',
  firstSteps: () => '/shop',
  newShop: () => '/shop/new',
  people: () => '/shop/people',
  places: () => '/shop/places',
  lamps: () => '/shop/lamps',
  hours: (search?: Search) => withSearch('/shop/hours', search),
  upkeep: (search?: Search) => withSearch('/shop/upkeep', search),
  settings: () => '/shop/settings',
  sheets: () => '/shop/sheets',
  /** `copyOf`: the sheet it begins like. */
  newSheet: (copyOf?: string) => withSearch('/shop/sheets/new', copyOf === undefined ? undefined : { copy: copyOf }),
  sheet: (sheetId: string, stage?: string) =>
    withSearch(`/shop/sheets/${sheetId}`, stage === undefined ? undefined : { stage }),
  coatings: (search?: Search) => withSearch('/shop/coatings', search),
  /** `copyOf`: the data sheet it begins like. */
  newCoating: (copyOf?: string) =>
    withSearch('/shop/coatings/new', copyOf === undefined ? undefined : { copy: copyOf }),
  coating: (coatingId: string) => `/shop/coatings/${coatingId}`,
  air: () => '/shop/air',
  keys: () => '/shop/keys',
  members: () => '/shop/members',
  letters: () => '/shop/letters',
  mailbox: (letterId?: string) => withSearch('/mailbox', letterId === undefined ? undefined : { letter: letterId }),
  licences: () => '/licences',
  /** `to`: where one wanted to go. */
  signIn: (to?: string) => withSearch('/sign-in', to === undefined || to === '/' ? undefined : { to }),
  forgotten: () => '/forgotten',
  reset: () => '/password-reset',
  signUp: () => '/sign-up',
  invitation: () => '/invitation',
};

/** Where to go after signing in: only ever a place of our own, whatever the address says. */
export function ownPlace(to: string | null): string {
  if (to === null || !/^\/(?![/\\])/.test(to)) return paths.home();
  const url = new URL(to, 'https://here.invalid');
  return url.host === 'here.invalid' ? url.pathname + url.search + url.hash : paths.home();
}
