import type { Trx } from '../db/in-shop.ts';
import { lockTapped, type TappedStage } from '../db/stages.ts';
import { notFound, Refusal } from '../errors.ts';
import { may, type Actor } from '../policies.ts';

/** The stage that was tapped, and those that share its booth run: one tap counts for the whole load. */
export type Tapped = { stage: TappedStage; load: TappedStage[] };

/** @throws {Refusal} not-found; forbidden where the work is somebody else's and the actor does not lead. */
export async function lockForTap(trx: Trx, actor: Actor, stageId: string): Promise<Tapped> {
  const load = await lockTapped(trx, actor.shopId, stageId);
  const stage = load.find((member) => member.id === stageId);
  if (!stage) throw notFound();
  if (!mayTap(actor, stage)) throw new Refusal('forbidden');
  return { stage, load };
}

/** Work without hands, such as a cure, belongs to whoever walks past. */
const mayTap = (actor: Actor, stage: TappedStage): boolean =>
  may.plan(actor) || (stage.bookingId !== null && (stage.personId === null || stage.personId === actor.personId));

/** @throws {Refusal} stale with what the stage is now. */
export function refuseStale(stage: TappedStage, seen: number): void {
  if (stage.version === seen) return;
  throw new Refusal('stale', { current: { id: stage.id, version: stage.version, state: stage.state } });
}

type TapRefusal = 'job-withdrawn' | 'not-booked' | 'previous-not-done' | 'not-started';

export const tapRefused = (code: TapRefusal, stage: TappedStage, clash?: { id: string; name: string }): Refusal =>
  new Refusal('refused', {
    reasons: [
      {
        code,
        rule: code === 'previous-not-done' ? 1 : null,
        stageId: stage.id,
        ids: clash ? [clash.id] : [],
        names: clash ? [clash.name] : [],
        at: [],
        minutes: [],
      },
    ],
  });
