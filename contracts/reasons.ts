import * as z from 'zod';

/**
 * Why something was refused: a code, the ids and the figures it speaks of. No sentences: the browser has one catalogue
 * (src/lib/reason-texts.ts) and knows the reader's clock and units.
 */
export const reason = z.strictObject({
  code: z.string(),
  /** The planning rule it comes from (1 to 13), null for reasons of other kinds. */
  rule: z.number().int().nullable(),
  stageId: z.uuid().nullable(),
  /** Stages, places, people, lamps it clashes with. */
  ids: z.array(z.string()),
  /** Names of those ids, in the same order, so that a sentence needs no look-up. */
  names: z.array(z.string()),
  at: z.array(z.iso.datetime({ offset: true })),
  minutes: z.array(z.number()),
});
export type Reason = z.output<typeof reason>;

export const errorCode = z.enum([
  'bad-request', // 400, with fields
  'not-signed-in', // 401
  'wrong-credentials', // 401
  'forbidden', // 403
  'cross-site', // 403
  'not-found', // 404
  'stale', // 409: somebody changed it since; `current` says what it is now
  'taken', // 409: somebody was faster
  'ground-shifted', // 409: the posted plan is no longer what the draft grew from
  'key-reused', // 409: this idempotency key came with another request
  'gone', // 410: link used or too old
  'too-large', // 413
  'wrong-kind', // 415: a file that is none of the kinds named in fields
  'refused', // 422: a rule is broken, with reasons
  'too-many', // 429, with Retry-After
  'internal', // 500
  'unavailable', // 503
]);
export type ErrorCode = z.output<typeof errorCode>;

/** Every 4xx and 5xx answer has this body. */
export const errorReply = z.strictObject({
  error: z.strictObject({
    code: errorCode,
    /** Where in the request it is wrong: path and a zod issue code or message. */
    fields: z.array(z.strictObject({ path: z.string(), message: z.string() })).optional(),
    reasons: z.array(reason).optional(),
    current: z.unknown().optional(),
    requestId: z.string().optional(),
  }),
});
export type ErrorReply = z.output<typeof errorReply>;
