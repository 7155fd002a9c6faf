import type { ErrorRequestHandler } from 'express';
import * as z from 'zod';
import type { ErrorReply } from '#contracts/reasons.ts';
import { Refusal, statusOf } from '../errors.ts';
import { refusalOfDatabase } from './database-fault.ts';

/** What Express and its body parser throw: http-errors with a status below 500. */
const requestFault = z.object({ status: z.number().int().min(400).max(499), type: z.string().optional() });

function refusalOfRequest(error: unknown): Refusal | null {
  const fault = requestFault.safeParse(error);
  if (!fault.success) return null;
  if (fault.data.status === 413) return new Refusal('too-large');
  return new Refusal('bad-request', { fields: [{ path: 'body', message: fault.data.type ?? 'unreadable' }] });
}

const refusalOf = (error: unknown): Refusal =>
  error instanceof Refusal ? error : (refusalOfDatabase(error) ?? refusalOfRequest(error) ?? new Refusal('internal'));

/** The last resort: every error leaves as the body of contracts/reasons.ts, and what we did not expect says nothing else. */
export const errorHandler: ErrorRequestHandler = (error: unknown, req, res, next) => {
  const refusal = refusalOf(error);
  const status = statusOf[refusal.code];
  if (status >= 500) req.log.error({ err: error }, 'request failed');
  else if (status === 401 || status === 403 || status === 429) req.log.warn({ code: refusal.code }, 'request refused');
  if (res.headersSent) return next(error);
  const { fields, reasons, current, retryAfterSeconds } = refusal.more;
  if (retryAfterSeconds !== undefined) res.set('Retry-After', String(Math.max(1, Math.ceil(retryAfterSeconds))));
  const body: ErrorReply['error'] = { code: refusal.code };
  if (fields) body.fields = fields;
  if (reasons) body.reasons = reasons;
  if (current !== undefined) body.current = current;
  // Only where it helps to find the log: an answer about another shop's row must not differ from one about no row.
  const requestId = res.get('X-Request-Id');
  if (status >= 500 && requestId !== undefined) body.requestId = requestId;
  res.status(status).json({ error: body } satisfies ErrorReply);
};
