import * as z from 'zod';
import { inShop } from './common.ts';

/** What can change. A notice says that and which, never the contents: the browser fetches again what it shows. */
export const changeKind = z.enum([
  'job-created',
  'job-changed',
  'job-withdrawn',
  'stage-started',
  'stage-finished',
  'draft-opened',
  'draft-changed',
  'draft-dropped',
  'plan-posted',
  'plan-run',
  'member-changed',
  'member-invited',
  'shop-changed',
  'people-changed',
  'sheets-changed',
  'air-read',
  'trace-attached',
  'trace-removed',
]);
export type ChangeKind = z.output<typeof changeKind>;

export const notice = z.strictObject({ seq: z.number().int(), kind: changeKind, ids: z.array(z.string()) });
export type Notice = z.output<typeof notice>;

/**
 * Server-sent events. `event: change` with a notice and its seq as id; `event: gap` when more was missed than is sent
 * again (fetch everything); `event: bye` when the session has ended. Reconnects with Last-Event-ID.
 */
export const liveStream = { name: 'live', method: 'GET', path: '/api/shops/:shopId/live', params: inShop } as const;
