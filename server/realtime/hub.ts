import * as z from 'zod';
import type { Notice } from '#contracts/live.ts';
import { CHANGE_CHANNEL, changesSince, currentSeq } from '../db/changes.ts';
import { inShop } from '../db/in-shop.ts';
import { SESSION_CHANNEL } from '../db/sessions.ts';
import type { Deps } from '../deps.ts';
import { listen, type Listener } from './listener.ts';
import { makePump } from './pump.ts';

/** One live screen. `seq` is the last change it knows of. */
export type Screen = {
  shopId: string;
  accountId: string;
  seq: number;
  send(notice: Notice): void;
  /** The number it starts from, so that it can say so when its connection breaks before anything changes. */
  startAt(seq: number): void;
  /** More was missed than is sent again: everything up to `seq` must be fetched anew. */
  skipTo(seq: number): void;
  /** Looks again whether this screen may still look on, and ends it where not. */
  recheck(): void;
  end(): void;
};

export type Hub = {
  /** Adds a screen; `lastSeq` is what it had when its connection broke, null for a new one. */
  add(screen: Omit<Screen, 'seq'>, lastSeq: number | null): Promise<() => void>;
  countOf(accountId: string): number;
  isListening(): boolean;
  start(): void;
  close(): Promise<void>;
};

const mostAgain = 500;
const wakeUp = z.object({ shopId: z.uuid() });

function shopOf(payload: string): string | null {
  try {
    return wakeUp.parse(JSON.parse(payload)).shopId;
  } catch {
    // Not one of ours: anybody may notify a channel.
    return null;
  }
}

/**
 * Tells live screens of this process what changed in their shop. A NOTIFY only wakes: the truth is read from the table of
 * changes, whose numbers run without gaps in order of commit, so that nothing is missed and nothing comes twice. One query a
 * shop and change, however many screens look on.
 */
export function makeHub(deps: Deps): Hub {
  const screens = new Set<Screen>();
  let listener: Listener | null = null;
  const ofShop = (shopId: string) => [...screens].filter((screen) => screen.shopId === shopId);

  const tell = async (shopId: string): Promise<boolean> => {
    const known = ofShop(shopId);
    if (known.length === 0) return false;
    const from = Math.min(...known.map((screen) => screen.seq));
    const notices = await inShop(deps.db, { shopId, accountId: null }, (trx) =>
      changesSince(trx, shopId, from, mostAgain),
    );
    // Not to a screen that came meanwhile: it may be further behind than what was read.
    for (const screen of known) for (const notice of notices) tellScreen(screen, notice);
    return notices.length === mostAgain;
  };
  const pump = makePump(tell, (error) => deps.log.warn({ err: error }, 'changes could not be read; trying again'));

  const heard = (channel: string, payload: string) => {
    if (channel === SESSION_CHANNEL) {
      for (const screen of screens) if (screen.accountId === payload) screen.recheck();
      return;
    }
    const shopId = shopOf(payload);
    if (shopId !== null) void pump(shopId);
  };

  const listeningAgain = () => {
    for (const screen of screens) screen.recheck();
    for (const shopId of new Set([...screens].map((screen) => screen.shopId))) void pump(shopId);
  };

  const start = () => {
    listener ??= listen({
      url: deps.config.DATABASE_URL,
      channels: [CHANGE_CHANNEL, SESSION_CHANNEL],
      log: deps.log,
      onNotice: heard,
      onListening: listeningAgain,
    });
  };

  return {
    start,
    async add(given, lastSeq) {
      start();
      const now = await inShop(deps.db, given, (trx) => currentSeq(trx, given.shopId));
      const missed = lastSeq === null ? 0 : now - lastSeq;
      const canCatchUp = missed >= 0 && missed <= mostAgain;
      const screen = { ...given, seq: canCatchUp && lastSeq !== null ? lastSeq : now };
      if (!canCatchUp) screen.skipTo(now);
      else screen.startAt(screen.seq);
      screens.add(screen);
      await pump(given.shopId);
      return () => void screens.delete(screen);
    },
    countOf: (accountId) => [...screens].filter((screen) => screen.accountId === accountId).length,
    isListening: () => listener?.isListening() ?? false,
    async close() {
      for (const screen of screens) screen.end();
      screens.clear();
      await listener?.close();
    },
  };
}

function tellScreen(screen: Screen, notice: Notice): void {
  if (notice.seq <= screen.seq) return;
  screen.seq = notice.seq;
  screen.send(notice);
}
