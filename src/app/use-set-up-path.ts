import { may, useShop } from '#src/lib/session.ts';
import { paths } from './paths.ts';

/** Where the set-up begins: with the first steps for who sets up, with the booths for who only looks. */
export function useSetUpPath(): string {
  const { role } = useShop();
  return may.setUp(role) ? paths.firstSteps() : paths.places();
}
