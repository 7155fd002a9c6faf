import { LEAST_PURGE_MINUTES } from '#chemistry/purge/purge-minutes.ts';
import type { Way } from '#contracts/sheets.ts';
import type { Mode } from '#planner/types.ts';
import type { OpenJob, OpenStage } from '#server/db/open-jobs.ts';
import type { PlaceSetUp, Resources } from '#server/db/resources.ts';
import type { AirBook } from '../air/air-book.ts';
import { heatLimitOf, heatMinutes, heatRefusedAt, heatsBooth, purgeOf, tooHot, usesLamps } from './heat.ts';
import { withinHeatBudget } from './heat-budget.ts';
import type { WayRefusal } from './refusals.ts';
import type { Roster } from './roster.ts';
import { toOffer } from './to-offer.ts';
import { unitsOf } from './units.ts';

/** Where a stage that is fixed stands: later stages may stay there. */
export type FixedSpot = { place: PlaceSetUp | null; phases: readonly (readonly [number, number])[]; way: string };
/** Where a plan that is judged has a stage; `phases` null: it is being moved, so they are laid anew. */
export type ChosenSpot = { way: string; placeId: string; phases: readonly (readonly [number, number])[] | null };
export type Setting = {
  resources: Resources;
  roster: Roster;
  fixed: ReadonlyMap<string, FixedSpot>;
  /** To judge a plan that is there: only the ways it has chosen, by stage. Null: any way, the planner chooses. */
  chosen: ReadonlyMap<string, ChosenSpot> | null;
  air: AirBook;
};

/** The ways of one stage that are left, as the planner's modes, and why the others are not. */
export type Offer = { modes: Mode[]; refused: Map<string, WayRefusal> };

/** A way on its way to becoming a mode: the places are still being narrowed. */
export type Candidate = { way: Way; places: PlaceSetUp[]; purge: number };
export type Narrowed = { stage: OpenStage; candidates: Candidate[]; refused: Map<string, WayRefusal> };

const waysOf = (stage: OpenStage, chosen: Setting['chosen']): Way[] =>
  chosen === null ? stage.ways : stage.ways.filter((way) => way.id === chosen.get(stage.id)?.way);

/** What may be done with each stage of a job that is not fixed. */
export function offersFor(job: OpenJob, setting: Setting): Map<string, Offer> {
  const loose = job.stages.filter((stage) => !setting.fixed.has(stage.id));
  const refused = new Map(loose.map((stage) => [stage.id, refusedByHeat(job, stage)]));
  spendHeat(job, loose, refused, setting);
  const chain: (Narrowed | FixedSpot)[] = [];
  for (const stage of job.stages) {
    const spot = setting.fixed.get(stage.id);
    chain.push(spot ?? narrow(job, stage, refused.get(stage.id) ?? new Map<string, WayRefusal>(), chain, setting));
  }
  const offers = new Map<string, Offer>();
  for (const [i, link] of chain.entries())
    if ('stage' in link) offers.set(link.stage.id, toOffer(job, link, placesOf(chain[i - 1]), setting));
  return offers;
}

/** Where a stage may leave the part. */
const placesOf = (link: Narrowed | FixedSpot | undefined): PlaceSetUp[] => {
  if (link === undefined) return [];
  if (!('stage' in link)) return link.place === null ? [] : [link.place];
  return [...new Set(link.candidates.flatMap(({ places }) => places))];
};

function refusedByHeat(job: OpenJob, stage: OpenStage): Map<string, WayRefusal> {
  const limit = heatLimitOf(job);
  return new Map(
    stage.ways.flatMap((way) => {
      const refusal = tooHot(way, limit);
      return refusal ? [[way.id, refusal] as const] : [];
    }),
  );
}

function spendHeat(
  job: OpenJob,
  loose: readonly OpenStage[],
  refused: Map<string, Map<string, WayRefusal>>,
  { fixed, chosen }: Setting,
): void {
  const budget = heatLimitOf(job).minutes?.limit;
  if (budget === undefined) return;
  const spent = job.stages.reduce((sum, stage) => {
    const spot = fixed.get(stage.id);
    const way = spot && stage.ways.find(({ id }) => id === spot.way);
    return way ? sum + heatMinutes(way, spot.phases) : sum;
  }, 0);
  const choices = loose.map((stage) => ({
    stageId: stage.id,
    ways: waysOf(stage, chosen).filter((way) => !refused.get(stage.id)?.has(way.id)),
  }));
  for (const [stageId, ways] of withinHeatBudget(choices, budget - spent))
    for (const [way, refusal] of ways) refused.get(stageId)?.set(way, refusal);
}

/** Finds the places of each way. A way that stays also narrows the places of the stages it may stay after. */
function narrow(
  job: OpenJob,
  stage: OpenStage,
  refused: Map<string, WayRefusal>,
  before: (Narrowed | FixedSpot)[],
  setting: Setting,
): Narrowed {
  const candidates = waysOf(stage, setting.chosen).flatMap((way): Candidate[] => {
    if (refused.has(way.id)) return [];
    const places = way.stay ? stayPlaces(way, before) : freePlaces(job, way, setting.resources);
    if (Array.isArray(places)) return [{ way, places, purge: purgeNeed(way, places) }];
    refused.set(way.id, places);
    return [];
  });
  return { stage, candidates, refused };
}

function freePlaces(job: OpenJob, way: Way, { places }: Resources): PlaceSetUp[] | WayRefusal {
  const kind = places.filter((place) => !place.retired && way.placeKinds.includes(place.kind));
  if (kind.length === 0) return { code: 'no-place', figures: [] };
  const units = unitsOf(job);
  const roomy = kind.filter((place) => place.units >= units);
  if (roomy.length === 0)
    return { code: 'does-not-fit', figures: [units, Math.max(...kind.map((place) => place.units))] };
  return heatable(way, roomy);
}

function heatable(way: Way, places: readonly PlaceSetUp[]): PlaceSetUp[] | WayRefusal {
  const judged = places.map((place) => ({ place, refusal: heatRefusedAt(way, place) }));
  const left = judged.flatMap(({ place, refusal }) => (refusal ? [] : [place]));
  const refusals = judged.flatMap(({ refusal }) => refusal ?? []);
  // An unknown purge can be mended by entering two figures, so that is the reason to show.
  const shown = refusals.find(({ code }) => code === 'purge-unknown') ?? refusals[0];
  return left.length === 0 && shown ? shown : left;
}

/**
 * The planner keeps a staying part where it is and does not ask whether that place may heat. So the stages it may stay
 * after only get places that may.
 */
function stayPlaces(way: Way, before: (Narrowed | FixedSpot)[]): PlaceSetUp[] | WayRefusal {
  const narrowed: { candidate: Candidate; places: PlaceSetUp[] }[] = [];
  const all: PlaceSetUp[] = [];
  for (let i = before.length - 1; i >= 0; i--) {
    const link = before[i];
    if (!link) break;
    if (!('stage' in link)) {
      if (link.place === null) return { code: 'nothing-to-stay-on', figures: [] };
      const left = heatable(way, [link.place]);
      if (!Array.isArray(left)) return left;
      all.push(link.place);
      break;
    }
    const anchors = link.candidates.filter((candidate) => !candidate.way.stay);
    const left = heatable(way, [...new Set(anchors.flatMap(({ places }) => places))]);
    if (!Array.isArray(left)) return left;
    for (const candidate of anchors)
      narrowed.push({ candidate, places: candidate.places.filter((place) => left.includes(place)) });
    all.push(...left);
    if (link.candidates.every((candidate) => !candidate.way.stay)) break;
  }
  if (all.length === 0) return { code: 'nothing-to-stay-on', figures: [] };
  for (const { candidate, places } of narrowed) candidate.places = places;
  return [...new Set(all)];
}

/** The longest purge that any of the places asks before heat goes on. */
function purgeNeed(way: Way, places: readonly PlaceSetUp[]): number {
  if (!heatsBooth(way) && !usesLamps(way)) return 0;
  return Math.max(LEAST_PURGE_MINUTES, ...places.map((place) => purgeOf(place) ?? 0));
}
