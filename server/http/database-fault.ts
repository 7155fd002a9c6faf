import { Refusal } from '../errors.ts';

const lostRace = ['23P01', '23505', '40P01', '40001'];
const notNow = ['55P03', '57014', '57P01', '57P02', '57P03', '53300', '53400', '25P03'];
/** A NUL or a lone half of a character, a number or a date beyond what a column holds. */
const impossibleValue = ['22021', '22P05', '22003', '22007', '22008'];
const network = ['ECONNREFUSED', 'ECONNRESET', 'EPIPE', 'ETIMEDOUT', 'ENOTFOUND', 'EHOSTUNREACH', 'EAI_AGAIN'];
const lostConnection =
  /^(timeout exceeded when trying to connect|Connection terminated)|Unable to acquire a connection/;

/**
 * What an error of the database means to who asked: somebody was faster (exclusion, unique, deadlock, serialization),
 * it is out of reach or too busy just now, or a value is one no column can hold.
 * Null where it is our own fault. Codes: PostgreSQL manual, appendix A.
 */
export function refusalOfDatabase(error: unknown): Refusal | null {
  if (!(error instanceof Error)) return null;
  const code = 'code' in error && typeof error.code === 'string' ? error.code : '';
  if (lostRace.includes(code)) return new Refusal('taken');
  if (notNow.includes(code) || network.includes(code) || /^08/.test(code) || isOutOfReach(error))
    return new Refusal('unavailable', { retryAfterSeconds: 2 });
  if (impossibleValue.includes(code)) return new Refusal('bad-request', { fields: [] });
  return null;
}

const isOutOfReach = (error: Error): boolean =>
  error.name === 'KnexTimeoutError' ||
  lostConnection.test(error.message) ||
  (error instanceof AggregateError && error.errors.some((inner) => refusalOfDatabase(inner) !== null));
