import type { Response } from 'express';
import { liveStream, type Notice } from '#contracts/live.ts';
import type { Deps } from '../deps.ts';
import { Refusal } from '../errors.ts';
import { may } from '../policies.ts';
import type { Hub } from '../realtime/hub.ts';
import { checkStream } from '../services/check-stream.ts';
import type { Routes } from './route.ts';

const heartbeat = 20_000;
const retryAfter = 2_000;
/** A browser holds one stream a tab. */
const mostStreams = 30;
/** A reader who is this far behind is dropped; it comes back with the number it has. */
const mostUnread = 262_144;

/** Server-sent events, as https://html.spec.whatwg.org/multipage/server-sent-events.html writes them. */
const written = {
  change: (notice: Notice) => `id: ${notice.seq}\nevent: change\ndata: ${JSON.stringify(notice)}\n\n`,
  gap: (seq: number) => `id: ${seq}\nevent: gap\ndata: ${JSON.stringify({ seq })}\n\n`,
  bye: `event: bye\ndata: {}\n\n`,
  stillHere: ': \n\n',
  retry: `retry: ${retryAfter}\n\n`,
};

function seqOf(header: string | undefined): number | null {
  return header !== undefined && /^\d{1,15}$/.test(header) ? Number(header) : null;
}

function openStream(res: Response): void {
  res.writeHead(200, {
    'Content-Type': 'text/event-stream; charset=utf-8',
    // Compression on the way would hold events back.
    'Cache-Control': 'no-store, no-transform',
    'X-Accel-Buffering': 'no',
  });
  res.write(written.retry);
}

export function liveRoutes(routes: Routes, deps: Deps, hub: Hub): void {
  routes.stream(liveStream, may.seeShop, async ({ actor, req, res }) => {
    if (hub.countOf(actor.accountId) >= mostStreams) throw new Refusal('too-many', { retryAfterSeconds: 60 });
    const { accountId, shopId } = actor;
    const sid = req.sessionID;
    const write = (text: string) => {
      if (res.writableEnded || res.destroyed) return;
      if (res.writableLength > mostUnread) res.destroy();
      else res.write(text);
    };
    const end = (last: string) => {
      write(last);
      res.end();
    };
    const recheck = () => {
      checkStream(deps, { sid, accountId, shopId }).then(
        (still) => {
          if (!still || !may.seeShop(still)) end(written.bye);
        },
        // Out of reach just now: asked again with the next heartbeat, and nothing is told meanwhile either.
        (error: unknown) => req.log.warn({ err: error }, 'live stream not checked'),
      );
    };
    const pulse = setInterval(() => {
      write(written.stillHere);
      recheck();
    }, heartbeat);
    let remove = () => {};
    res.on('close', () => {
      clearInterval(pulse);
      remove();
    });
    openStream(res);
    remove = await hub.add(
      {
        shopId,
        accountId,
        send: (notice) => write(written.change(notice)),
        startAt: (seq) => write(`id: ${seq}\n\n`),
        skipTo: (seq) => write(written.gap(seq)),
        recheck,
        end: () => end(written.retry),
      },
      seqOf(req.get('last-event-id')),
    );
    if (res.destroyed || res.writableEnded) remove();
  });
}
