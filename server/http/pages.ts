import { readFile } from 'node:fs/promises';
import path from 'node:path';
import express, { Router, type RequestHandler } from 'express';
import type { Config } from '../config.ts';
import { notFound, Refusal } from '../errors.ts';
import { neverStore, nonceOf } from './security.ts';

/** Stands in the built index.html where each answer gets its own nonce. */
export const noncePlace = '__CSP_NONCE__';

/**
 * The built pages. What carries a hash in its name never changes; index.html is made anew for each request; every address
 * that is no file is the app's own to show.
 */
export function pages(config: Config): Router {
  const root = path.resolve(config.WEB_ROOT);
  const router = Router();
  router.use('/assets', express.static(path.join(root, 'assets'), { immutable: true, maxAge: '1y', index: false }));
  router.use('/assets', () => {
    throw notFound();
  });
  const page: RequestHandler = async (_req, res) => {
    const html = await readIndex(root);
    res.type('html').send(html.replaceAll(noncePlace, nonceOf(res)));
  };
  router.get('/index.html', neverStore, page);
  router.use(express.static(root, { index: false, maxAge: '1h', setHeaders: revalidate, redirect: false }));
  router.get('/{*path}', neverStore, page);
  router.use(() => {
    throw notFound();
  });
  return router;
}

/** The page itself and what must not lag behind a release, such as a service worker. */
function revalidate(res: { setHeader(name: string, value: string): void }, file: string): void {
  if (/\.(html|js|webmanifest)$/.test(file)) res.setHeader('Cache-Control', 'no-cache');
}

async function readIndex(root: string): Promise<string> {
  try {
    return await readFile(path.join(root, 'index.html'), 'utf8');
  } catch {
    // The pages are not built, as in development, where Vite serves them.
    throw new Refusal('not-found');
  }
}
