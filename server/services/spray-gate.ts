import type { SprayAir } from '#contracts/bench.ts';
import type { Reason } from '#contracts/reasons.ts';
import { loadAir } from '../db/air.ts';
import type { Trx } from '../db/in-shop.ts';
import type { TappedStage } from '../db/stages.ts';
import { Refusal } from '../errors.ts';
import { sprayAir } from '../planning/air/spray-air.ts';
import { may, type Actor } from '../policies.ts';

/** Why a stage was sprayed although the surface was too near the dew point; kept with the stage and in the history. */
export type Overruled = { rule: 'dew-point'; reason: string; by: string; at: string; figures: Reason['minutes'] };
export type Gated = { air: SprayAir | null; overruled: Overruled | null };

type Start = { started: readonly TappedStage[]; overrule: string | undefined; now: Date };

/**
 * The gate before spraying. A reading that is not too old and says that the surface is too near the dew point holds the
 * stage up, unless who leads says why it is sprayed all the same. Without such a reading nothing is held up; the answer says
 * that nobody knows.
 * @throws {Refusal} refused with `dew-point`; forbidden where somebody overrules who may not.
 */
export async function passSprayGate(trx: Trx, actor: Actor, { started, overrule, now }: Start): Promise<Gated> {
  if (overrule !== undefined && !may.plan(actor)) throw new Refusal('forbidden');
  const spraying = started.find(({ sprays }) => sprays);
  if (!spraying) return { air: null, overruled: null };
  const air = sprayAir(await loadAir(trx, actor.shopId), spraying.zoneId, now);
  if (!air.gate?.fresh || air.gate.open) return { air, overruled: null };
  const reason = reasonOf(air, spraying);
  if (overrule === undefined) throw new Refusal('refused', { reasons: [reason] });
  const overruled = { rule: 'dew-point' as const, reason: overrule, by: actor.accountId, at: now.toISOString() };
  return { air, overruled: { ...overruled, figures: reason.minutes } };
}

/** `minutes`: air, humidity, surface, dew point, margin, margin asked, and 1 where the surface was measured. */
function reasonOf({ zoneName, reading, gate }: SprayAir, stage: TappedStage): Reason {
  return {
    code: 'dew-point',
    rule: null,
    stageId: stage.id,
    ids: stage.zoneId === null ? [] : [stage.zoneId],
    names: [zoneName ?? ''],
    at: reading ? [reading.at] : [],
    minutes: [
      reading?.celsius ?? 0,
      reading?.humidity ?? 0,
      gate?.surfaceCelsius ?? 0,
      gate?.dewPointCelsius ?? 0,
      gate?.marginCelsius ?? 0,
      gate?.neededCelsius ?? 0,
      gate?.surfaceMeasured ? 1 : 0,
    ],
  };
}
