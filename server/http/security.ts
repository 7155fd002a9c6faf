import { randomBytes } from 'node:crypto';
import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';
import type { Config } from '../config.ts';
import { isHttps } from './session-store.ts';

export const nonceOf = (res: Response): string => String(res.locals['nonce']);

const oneYear = 31_536_000;

/** Headers of every answer. Styles that the calendar and the dialogs add at run time carry the request's nonce. */
export function securityHeaders(config: Config): RequestHandler[] {
  const giveNonce: RequestHandler = (_req, res, next) => {
    res.locals['nonce'] = randomBytes(16).toString('base64');
    res.set('Permissions-Policy', 'camera=(self), geolocation=(), microphone=(), payment=(), usb=()');
    next();
  };
  const headers = helmet({
    contentSecurityPolicy: {
      // The library's defaults allow inline styles and send plain-http pages to https.
      useDefaults: false,
      directives: {
        'default-src': ["'self'"],
        'script-src': ["'self'"],
        'style-src': ["'self'", (_req, res) => `'nonce-${nonceOf(res as Response)}'`],
        'img-src': ["'self'", 'data:', 'blob:'],
        'font-src': ["'self'", 'data:'],
        'connect-src': ["'self'"],
        'worker-src': ["'self'"],
        'manifest-src': ["'self'"],
        'object-src': ["'none'"],
        'base-uri': ["'none'"],
        'frame-ancestors': ["'none'"],
        'form-action': ["'self'"],
      },
    },
    strictTransportSecurity: isHttps(config) ? { maxAge: oneYear, includeSubDomains: true } : false,
    crossOriginOpenerPolicy: { policy: 'same-origin' },
    crossOriginResourcePolicy: { policy: 'same-origin' },
    referrerPolicy: { policy: 'no-referrer' },
    xFrameOptions: { action: 'deny' },
  });
  return [giveNonce, headers];
}

export const neverStore: RequestHandler = (_req, res, next) => {
  res.set('Cache-Control', 'no-store');
  next();
};
