import type { Request, RequestHandler } from 'express';
import { Refusal } from '../errors.ts';

const safe = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Lets no other site act with a person's cookie. Sec-Fetch-Site decides where the browser sends it (https and loopback);
 * else Origin, which every browser sends with a write, must name the host that was asked. A program that sends neither
 * carries no browser's cookie. Besides, a body must be JSON, which no plain form can send, or a form with a header of our
 * own, which none can send either (OWASP cheat sheet on cross-site request forgery: fetch metadata, origin check, custom
 * headers).
 */
export const refuseOtherSites: RequestHandler = (req, _res, next) => {
  if (safe.includes(req.method)) return next();
  const site = req.get('sec-fetch-site');
  const isOurs = site === undefined ? originIsHost(req.get('origin'), req.get('host')) : site === 'same-origin';
  if (!isOurs) throw new Refusal('cross-site');
  const hasBody = req.get('transfer-encoding') !== undefined || Number(req.get('content-length') ?? 0) > 0;
  const isTyped = req.get('content-type') !== undefined;
  if ((hasBody || isTyped) && !isJson(req) && !isKeyedForm(req))
    throw new Refusal('bad-request', {
      fields: [{ path: 'headers.content-type', message: 'must be application/json' }],
    });
  next();
};

const isJson = (req: Request): boolean => /^application\/json\s*(;|$)/i.test(req.get('content-type') ?? '');

/** Routes that take no form read nothing of it and refuse it as an empty body. */
const isKeyedForm = (req: Request): boolean =>
  /^multipart\/form-data\s*;/i.test(req.get('content-type') ?? '') && req.get('idempotency-key') !== undefined;

function originIsHost(origin: string | undefined, host: string | undefined): boolean {
  if (origin === undefined) return true;
  return URL.canParse(origin) && new URL(origin).host === host;
}
