import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant } from './common.ts';

export const apiKey = z.strictObject({
  id,
  label: z.string(),
  /** How it begins and ends, to tell it from others. */
  hint: z.string(),
  createdBy: z.string().nullable(),
  createdAt: instant,
  lastUsedAt: instant.nullable(),
  revokedAt: instant.nullable(),
});
export type ApiKey = z.output<typeof apiKey>;

export const listApiKeys = endpoint({
  name: 'list-api-keys',
  method: 'GET',
  path: '/api/shops/:shopId/api-keys',
  params: inShop,
  reply: z.strictObject({ keys: z.array(apiKey) }),
});

/** The secret is said once, in this answer. Asked again with the same id: `taken`, for nobody can say it again. */
export const createApiKey = endpoint({
  name: 'create-api-key',
  method: 'POST',
  path: '/api/shops/:shopId/api-keys',
  params: inShop,
  body: z.strictObject({ id, label: z.string().trim().min(1).max(80) }),
  reply: z.strictObject({ key: apiKey, secret: z.string() }),
});

/** For good. Revoked twice is revoked. */
export const revokeApiKey = endpoint({
  name: 'revoke-api-key',
  method: 'POST',
  path: '/api/shops/:shopId/api-keys/:keyId/revoke',
  params: inShop.extend({ keyId: id }),
  reply: apiKey,
});
