import * as z from 'zod';
import { id, inShop, instant } from './common.ts';

/** A file somebody put in. `name` is only shown and offered for saving; the bytes lie under the id. */
export const attachment = z.strictObject({
  id,
  name: z.string(),
  bytes: z.number().int(),
  mime: z.string(),
  at: instant,
  by: z.string().nullable(),
});
export type Attachment = z.output<typeof attachment>;

/** Most of one file; a shop's own limits of count and bytes are set where the server is (server/config.ts). */
export const mostUploadBytes = 10_485_760;

/**
 * An upload: `multipart/form-data` with a single part `file` and nothing else. Answers with JSON; refused with 413 where it
 * is too large or the shop's room is used up, 415 where its content is not of a kind that is taken, 400 where it is torn.
 */
export type Upload = { name: string; method: 'POST'; path: `/api/${string}`; params: z.ZodType; reply: z.ZodType };

/** Answers with the file itself, to be saved. */
export const downloadAttachment = {
  name: 'download-attachment',
  method: 'GET',
  path: '/api/shops/:shopId/attachments/:attachmentId',
  params: inShop.extend({ attachmentId: id }),
} as const;
