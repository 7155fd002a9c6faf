import { createHash, createHmac } from 'node:crypto';
import type { Config } from '../config.ts';

/**
 * The token of a link in a letter: 256 bits that nobody can guess without the server's secret. It is reckoned from the id of
 * what it opens, so that a letter which has to be sent again says the same, and it is stored nowhere but as a hash.
 */
export const tokenFor = (config: Config, purpose: 'reset' | 'invitation' | 'sign-up', id: string): string =>
  createHmac('sha256', config.SESSION_SECRET).update(`${purpose} link ${id}`).digest('base64url');

export const hashOf = (token: string): Buffer => createHash('sha256').update(token).digest();
