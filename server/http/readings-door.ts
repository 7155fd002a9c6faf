import express, { type RequestHandler, type Router } from 'express';
import { sendReadings } from '#contracts/air.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { openWithKey, type KeyHolder } from '../services/open-with-key.ts';
import * as send from '../services/send-readings.ts';
import type { Limits } from './limits.ts';
import type { Routes } from './route.ts';

const bodyLimit = 262_144;

/**
 * The door of loggers, before cookies and sessions: a key opens it and nothing else does. Who has none is told nothing, not
 * even what a body would have to be. Registered ahead of what asks for a page's origin, for no browser comes here.
 */
export function readingsDoor(routes: Routes, router: Router, deps: Deps, limits: Limits): void {
  const holders = new WeakMap<object, KeyHolder>();
  const open: RequestHandler = async (req, _res, next) => {
    await limits.keys.knock(req);
    const secret = /^Bearer (\S+)$/i.exec(req.get('authorization') ?? '')?.[1];
    const holder = secret === undefined ? null : await openWithKey(deps, secret);
    if (!holder) throw new Refusal('not-signed-in');
    await limits.keys.take(holder.keyId);
    holders.set(req, holder);
    next();
  };
  router.post(sendReadings.path, open, express.json({ limit: bodyLimit, inflate: false }));
  routes.open(sendReadings, 'public', async ({ req, body }) => {
    const holder = holders.get(req);
    if (!holder) throw new Refusal('not-signed-in');
    return send.sendReadings(deps, holder, body);
  });
}
