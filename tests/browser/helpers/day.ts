import type { APIRequestContext, Locator, Page } from 'playwright-core';
import type { Bar, DayView } from '#contracts/day.ts';
import type { moveStage } from '#contracts/drafts.ts';
import type { ReplyOf } from '#contracts/endpoint.ts';
import type { Reason } from '#contracts/reasons.ts';
import { demoShopId } from '../../../seeds/index.ts';

const MINUTE = 60_000;
const shop = `/api/shops/${demoShopId}`;

/** Days of the week in which the tests stand, in the demo shop's zone: UTC+1 in early March. */
export const days = ['2026-03-10', '2026-03-11', '2026-03-12'] as const;
export const spanOf = (day: string, count = 1) => {
  const from = Date.parse(`${day}T00:00:00+01:00`);
  return { from: new Date(from).toISOString(), to: new Date(from + count * 1440 * MINUTE).toISOString() };
};

export async function readDay(
  asker: APIRequestContext,
  plan: 'draft' | 'posted',
  span = spanOf(days[0]),
): Promise<DayView> {
  const answer = await asker.get(`${shop}/day`, { params: { ...span, plan } });
  if (!answer.ok()) throw new Error(`The day was not given: ${answer.status()} ${await answer.text()}`);
  return (await answer.json()) as DayView;
}

export type Target = { start: string; placeId: string };

/** Asks the server about a move without doing it: the reasons against it, and whom it would have. */
async function ask(asker: APIRequestContext, version: number, bar: Bar, to: Target) {
  const data = { version, dryRun: true, ...to };
  const answer = await asker.post(`${shop}/draft/stages/${bar.id}/move`, { data });
  if (!answer.ok()) throw new Error(`No answer about a move: ${answer.status()} ${await answer.text()}`);
  return (await answer.json()) as ReplyOf<typeof moveStage>;
}

/** A move of one of the bars that is legal and makes it the work of somebody who is wanted; null where there is none. */
export async function findLegalMove(
  asker: APIRequestContext,
  view: DayView,
  bars: readonly Bar[],
  isWanted: (personId: string | null) => boolean = () => true,
): Promise<{ bar: Bar; to: Target; personId: string | null } | null> {
  for (const bar of bars)
    for (const to of targets(view, bar)) {
      const { reasons, moved } = await ask(asker, versionOf(view), bar, to);
      const there = moved.find(({ stageId }) => stageId === bar.id);
      if (reasons.length === 0 && there && isWanted(there.personId)) return { bar, to, personId: there.personId };
    }
  return null;
}

/** A move of one of the bars that a rule of the planner forbids, with the reasons the server gives, `most` of them. */
export async function findIllegalMove(
  asker: APIRequestContext,
  view: DayView,
  bars: readonly Bar[],
  most = Infinity,
): Promise<{ bar: Bar; to: Target; reasons: Reason[] }> {
  for (const bar of bars)
    for (const to of targets(view, bar)) {
      const { reasons } = await ask(asker, versionOf(view), bar, to);
      if (reasons.length > 0 && reasons.length <= most) return { bar, to, reasons };
    }
  throw new Error('Every move is allowed: the demo shop has changed, and so must this test.');
}

function versionOf(view: DayView): number {
  if (!view.draft) throw new Error('There is no draft.');
  return view.draft.version;
}

/** Where a bar might go within the hours shown: other times, there or in another place of its kind; last, only another place. */
function* targets(view: DayView, bar: Bar): Generator<Target> {
  const kind = view.rows.find(({ id }) => id === bar.placeId)?.kind;
  const places = view.rows.filter((row) => row.kind === kind).map(({ id }) => id);
  const others = places.filter((id) => id !== bar.placeId);
  const hours = view.open[0];
  for (const minutes of [30, 60, 15, -15, -30, 0]) {
    const start = new Date(Date.parse(bar.from) + minutes * MINUTE).toISOString();
    const isShown = hours && start >= hours.from && Date.parse(start) < Date.parse(hours.to) - 15 * MINUTE;
    if (!isShown || start <= view.serverTime) continue;
    for (const placeId of minutes === 0 ? others : [bar.placeId, ...others]) yield { start, placeId };
  }
}

/** Bars that may be taken with the mouse: not begun, alone in their load, long enough to be hit. */
export const mayBeDragged = (view: DayView): Bar[] =>
  view.bars.filter(
    (bar) =>
      bar.state === 'planned' &&
      view.rows.some(({ id, kind }) => id === bar.placeId && kind !== 'rack') &&
      !bar.pinned &&
      bar.from > view.serverTime &&
      Date.parse(bar.to) - Date.parse(bar.from) >= 25 * MINUTE &&
      view.bars.every((other) => other.id === bar.id || other.loadId !== bar.loadId),
  );

export const barOf = (page: Page, stageId: string): Locator => page.locator(`[data-bar="${stageId}"]`);
const laneOf = (page: Page, placeId: string): Locator => page.locator(`[data-lane="${placeId}"]`);

export type Box = { x: number; y: number; width: number; height: number };
export async function boxOf(locator: Locator): Promise<Box> {
  const box = await locator.boundingBox();
  if (!box) throw new Error('It is not on the page.');
  return box;
}

/** Drags a bar with the mouse to a time and a place; where a drag snaps to five minutes, the pointer is half way between. */
export async function drag(page: Page, bar: Bar, to: Target): Promise<void> {
  const [from, end] = [Date.parse(bar.from), Date.parse(bar.to)];
  const there = barOf(page, bar.id);
  await there.scrollIntoViewIfNeeded();
  const box = await boxOf(there);
  const perMinute = box.width / ((end - from) / MINUTE);
  // The instant that is taken hold of.
  const held = Math.ceil((from + 3 * MINUTE) / (5 * MINUTE)) * 5 * MINUTE + 2.5 * MINUTE;
  const x = box.x + ((held - from) / MINUTE) * perMinute;
  const y = box.y + box.height / 2;
  const lane = await boxOf(laneOf(page, to.placeId));
  const toX = x + ((Date.parse(to.start) - from) / MINUTE) * perMinute;
  const toY = bar.placeId === to.placeId ? y : lane.y + lane.height / 2;
  await page.mouse.move(x, y);
  await page.mouse.down();
  await page.mouse.move(x + 8, y, { steps: 4 });
  await page.mouse.move(toX, toY, { steps: 12 });
  await page.mouse.up();
}
