import { createHash } from 'node:crypto';
import { isIPv6 } from 'node:net';
import type { Request } from 'express';
import { RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import { Refusal } from '../errors.ts';

const minute = 60;

/**
 * How often something may be tried, counted in the database and so for all processes together. There is no limit by
 * account alone: whoever hammers somebody's account from one address does not lock its owner out at another.
 */
export type Limits = {
  /** Tries at a password: by account and address, and by address alone. Forgiven when it was right. */
  password: {
    take(req: Request, account: string): Promise<void>;
    forgive(req: Request, account: string): Promise<void>;
  };
  /** Letters that anybody can ask for. */
  letters: { take(req: Request, account: string): Promise<void> };
  /** Links from letters; guessing one is hopeless, trying without end is a burden. */
  links: { take(req: Request): Promise<void> };
  /** Letters that a shop sends to new people. */
  invitations: { take(shopId: string): Promise<void> };
  /** Shops that an account opens. */
  shops: { take(accountId: string): Promise<void> };
  /** Loggers: knocks at the door by address, good key or not, and requests by key. */
  keys: { knock(req: Request): Promise<void>; take(keyId: string): Promise<void> };
};

export function makeLimits(pool: object): Limits {
  const limiter = (keyPrefix: string, points: number, minutes: number) =>
    new RateLimiterPostgres({
      storeClient: pool,
      storeType: 'pool',
      tableName: 'rate_limit',
      tableCreated: true,
      clearExpiredByTimeout: false,
      keyPrefix,
      points,
      duration: minutes * minute,
    });
  const passwordByPair = limiter('password-pair', 10, 15);
  const passwordByAddress = limiter('password-address', 100, 15);
  const lettersByPair = limiter('letters-pair', 5, 60);
  const lettersByAddress = limiter('letters-address', 30, 60);
  const linksByAddress = limiter('links-address', 60, 15);
  const shopsByAccount = limiter('shops-account', 10, 60);
  const invitationsByShop = limiter('invitations-shop', 60, 60);
  const knocksByAddress = limiter('keys-address', 300, 1);
  const requestsByKey = limiter('keys-key', 60, 1);
  return {
    password: {
      async take(req, account) {
        await consume(passwordByPair, pair(req, account));
        await consume(passwordByAddress, addressOf(req));
      },
      async forgive(req, account) {
        await passwordByPair.delete(pair(req, account));
        await passwordByAddress.reward(addressOf(req), 1);
      },
    },
    letters: {
      async take(req, account) {
        await consume(lettersByPair, pair(req, account));
        await consume(lettersByAddress, addressOf(req));
      },
    },
    links: { take: (req) => consume(linksByAddress, addressOf(req)) },
    invitations: { take: (shopId) => consume(invitationsByShop, shopId) },
    shops: { take: (accountId) => consume(shopsByAccount, accountId) },
    keys: {
      knock: (req) => consume(knocksByAddress, addressOf(req)),
      take: (keyId) => consume(requestsByKey, keyId),
    },
  };
}

/** @throws {Refusal} too-many, with the time to wait */
async function consume(limiter: RateLimiterPostgres, key: string): Promise<void> {
  try {
    await limiter.consume(key);
  } catch (refused) {
    if (!(refused instanceof RateLimiterRes)) throw refused;
    throw new Refusal('too-many', { retryAfterSeconds: refused.msBeforeNext / 1000 });
  }
}

/** The table shows nobody's address of mail. */
const pair = (req: Request, account: string): string =>
  `${createHash('sha256').update(account.toLowerCase()).digest('base64url')}@${addressOf(req)}`;

/** One household has a whole /64 of IPv6, so that is what counts as one address (RFC 6177). */
export function addressOf(req: Pick<Request, 'ip'>): string {
  const address = (req.ip ?? 'unknown').replace(/^::ffff:(?=\d+\.)/, '');
  if (!isIPv6(address)) return address;
  const [head = '', tail] = address.split('::');
  const left = head === '' ? [] : head.split(':');
  const right = tail === undefined || tail === '' ? [] : tail.split(':');
  const groups =
    tail === undefined ? left : [...left, ...Array<string>(8 - left.length - right.length).fill('0'), ...right];
  return `${groups
    .slice(0, 4)
    .map((group) => parseInt(group, 16).toString(16))
    .join(':')}::/64`;
}
