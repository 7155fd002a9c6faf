import * as z from 'zod';
import { endpoint } from './endpoint.ts';
import { id, inShop, instant } from './common.ts';

const head = z.strictObject({
  id: z.string(),
  at: instant,
  from: z.string(),
  to: z.string(),
  subject: z.string(),
  messageId: z.string(),
});
/** Letters that the local SMTP server kept. Only there when that server is in use. */
export const listMailbox = endpoint({
  name: 'list-mailbox',
  method: 'GET',
  path: '/api/mailbox',
  reply: z.strictObject({ letters: z.array(head) }),
});
export const readMailboxLetter = endpoint({
  name: 'read-mailbox-letter',
  method: 'GET',
  path: '/api/mailbox/:letterId',
  params: z.strictObject({ letterId: z.string().regex(/^[A-Za-z0-9_-]{1,80}$/) }),
  reply: head.extend({ text: z.string(), html: z.string() }),
});

/** The outbox as owners see it: what waits, what was sent, what could not be delivered. */
export const listLetters = endpoint({
  name: 'list-letters',
  method: 'GET',
  path: '/api/shops/:shopId/letters',
  params: inShop,
  query: z.strictObject({ state: z.enum(['queued', 'sent', 'dropped', 'dead']).optional() }),
  reply: z.strictObject({
    letters: z.array(
      z.strictObject({
        id,
        kind: z.string(),
        to: z.string(),
        state: z.enum(['queued', 'sent', 'dropped', 'dead']),
        createdAt: instant,
        sentAt: instant.nullable(),
        lastError: z.string().nullable(),
      }),
    ),
  }),
});
