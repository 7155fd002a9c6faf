import type { Config } from '../config.ts';

/** Where links in letters lead. A token stands behind #, so that it is in no log and no Referer. */
export const linkTo = (config: Config) => ({
  reset: (token: string) => `${config.PUBLIC_URL}/password-reset#${token}`,
  signUp: (token: string) => `${config.PUBLIC_URL}/sign-up#${token}`,
  signIn: () => `${config.PUBLIC_URL}/sign-in`,
  invitation: (token: string) => `${config.PUBLIC_URL}/invitation#${token}`,
  settings: () => `${config.PUBLIC_URL}/shop/settings`,
  people: () => `${config.PUBLIC_URL}/shop/people`,
  bench: () => `${config.PUBLIC_URL}/bench`,
});
