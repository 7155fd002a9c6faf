import type { RequestHandler } from 'express';
import { Refusal } from '../errors.ts';

const safe = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Lets no other site act with a person's cookie. Sec-Fetch-Site decides where the browser sends it (https and loopback);
 * else Origin, which every browser sends with a write, must name the host that was asked. A program that sends neither
 * carries no browser's cookie. Besides, a body must be JSON, which no plain form can send (OWASP cheat sheet on
 * cross-site request forgery: fetch metadata, origin check).
 */
export const refuseOtherSites: RequestHandler = (req, _res, next) => {
  if (safe.includes(req.method)) return next();
  const site = req.get('sec-fetch-site');
  const isOurs = site === undefined ? originIsHost(req.get('origin'), req.get('host')) : site === 'same-origin';
  if (!isOurs) throw new Refusal('cross-site');
  const hasBody = req.get('transfer-encoding') !== undefined || Number(req.get('content-length') ?? 0) > 0;
  const isTyped = req.get('content-type') !== undefined;
  if ((hasBody || isTyped) && !/^application\/json\s*(;|$)/i.test(req.get('content-type') ?? ''))
    throw new Refusal('bad-request', {
      fields: [{ path: 'headers.content-type', message: 'must be application/json' }],
    });
  next();
};

function originIsHost(origin: string | undefined, host: string | undefined): boolean {
  if (origin === undefined) return true;
  return URL.canParse(origin) && new URL(origin).host === host;
}
