import { parseOptions } from '@node-rs/argon2';
import { expect, test } from 'vitest';
import type { Deps } from '#server/deps.ts';
import { hashPassword, isPassword } from '#server/services/passwords.ts';

const product = {} as Deps;

// OWASP Password Storage Cheat Sheet: argon2id, at least 19 MiB, 2 iterations, 1 degree of parallelism.
test('passwords are hashed with argon2id at the recommended cost, each with its own salt', async () => {
  const [first, second] = await Promise.all([hashPassword(product, 'the same'), hashPassword(product, 'the same')]);
  expect(first).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  expect(parseOptions(first)).toMatchObject({ memoryCost: 19_456, timeCost: 2, parallelism: 1, outputLen: 32 });
  expect(first).not.toBe(second);
  expect(await isPassword(product, first, 'the same')).toBe(true);
  expect(await isPassword(product, first, 'the sane')).toBe(false);
});

test('no password matches an account that has none', async () => {
  expect(await isPassword(product, null, '')).toBe(false);
});
