import { randomUUID } from 'node:crypto';
import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** Who, when, what, as one line of JSON a request, with a number of our own making that the answer carries too. */
export function requestLog(log: Logger): RequestHandler {
  return pinoHttp({
    logger: log,
    genReqId: (_req, res) => {
      const id = randomUUID();
      res.setHeader('X-Request-Id', id);
      return id;
    },
    // No bodies, no cookies, no query: whatever could hold a secret stays out.
    serializers: {
      req: (req: { id: string; method: string; url: string; remoteAddress: string }) => ({
        id: req.id,
        method: req.method,
        path: req.url.split('?', 1)[0],
        from: req.remoteAddress,
      }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
    },
    customLogLevel: (_req, res, error) => (error || res.statusCode >= 500 ? 'error' : 'info'),
  }) as RequestHandler;
}
