import { v7 as uuid } from 'uuid';
import { defaultAirSettings } from '#contracts/air.ts';
import type { Way } from '#contracts/sheets.ts';
import type { Booked, Booking } from '#server/db/bookings.ts';
import type { DraftItem } from '#server/db/drafts.ts';
import type { OpenJob, OpenStage } from '#server/db/open-jobs.ts';
import type { LampSetUp, PersonSetUp, PlaceSetUp, Resources } from '#server/db/resources.ts';
import type { Facts } from '#server/planning/facts.ts';

export const ZONE = 'Europe/Berlin';
/** Monday, 07:00 in the shop. */
export const MONDAY = new Date('2026-06-01T05:00:00Z');
export const at = (day: number, time: string): Date => {
  const local = Date.parse(`2026-06-0${day}T${time}:00Z`);
  return new Date(local - 2 * 3_600_000);
};

export const place = (part: Partial<PlaceSetUp> = {}): PlaceSetUp => ({
  id: uuid(),
  kind: 'booth',
  name: 'Booth',
  zoneId: null,
  units: 10,
  bakes: true,
  bakeLimitCelsius: 80,
  volumeM3: 96,
  airFlowM3PerHour: 20_000,
  clearanceMinutes: 5,
  retired: false,
  ...part,
});
export const person = (part: Partial<PersonSetUp> = {}): PersonSetUp => ({
  id: uuid(),
  name: 'Painter',
  skills: ['paint', 'prep'],
  sprayTrainedOn: '2024-01-10',
  retired: false,
  ...part,
});
export const lamp = (part: Partial<LampSetUp> & { circuitId: string }): LampSetUp => ({
  id: uuid(),
  name: 'Lamp',
  kilowatts: 6,
  wave: 'short',
  retired: false,
  ...part,
});

export const way = (part: Partial<Way> = {}): Way => ({
  id: 'booth',
  label: 'In the booth',
  placeKinds: ['booth'],
  stay: false,
  skill: 'paint',
  lampCount: 0,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: false,
  bakeCelsius: null,
  phases: [{ kind: 'work', minutes: 30, attendance: 'hands' }],
  ...part,
});
export const spray = (part: Partial<Way> = {}): Way =>
  way({
    id: 'spray',
    label: 'Spray',
    phases: [
      { kind: 'spray', minutes: 20, attendance: 'hands' },
      { kind: 'flash', minutes: 10, attendance: 'none' },
    ],
    ...part,
  });
export const boothBake = (part: Partial<Way> = {}): Way =>
  way({
    id: 'booth-bake',
    label: 'Booth bake',
    placeKinds: [],
    stay: true,
    skill: null,
    gap: { min: 10, max: 60, settle: 0 },
    bakeCelsius: 60,
    phases: [
      { kind: 'purge', minutes: 3, attendance: 'none' },
      { kind: 'bake', minutes: 30, attendance: 'onsite' },
    ],
    ...part,
  });
export const lampCure = (part: Partial<Way> = {}): Way =>
  way({
    id: 'lamp',
    label: 'Cure lamp',
    placeKinds: ['prep'],
    skill: null,
    lampCount: 1,
    gap: { min: 10, max: 120, settle: 0 },
    bakeCelsius: 60,
    phases: [{ kind: 'bake', minutes: 20, attendance: 'onsite', lamp: true }],
    ...part,
  });
export const airDry = (part: Partial<Way> = {}): Way =>
  way({
    id: 'air',
    label: 'Air dry',
    placeKinds: ['rack'],
    skill: null,
    gap: { min: 20, max: null, settle: 20 },
    phases: [{ kind: 'cool', minutes: 180, attendance: 'none' }],
    ...part,
  });

export const stage = (ways: Way[], part: Partial<OpenStage> = {}): OpenStage => ({
  id: uuid(),
  position: 0,
  kind: 'paint',
  title: 'Paint',
  coatingId: null,
  ways,
  state: 'waiting',
  startedAt: null,
  finishedAt: null,
  version: 1,
  ...part,
});
export const job = (stages: OpenStage[], part: Partial<OpenJob> = {}): OpenJob => ({
  id: uuid(),
  number: 1,
  title: 'Bonnet',
  releaseAt: at(1, '00:00'),
  promiseAt: null,
  weight: 1,
  electric: false,
  heatLimitCelsius: null,
  heatLimitMinutes: null,
  parts: [{ name: 'Bonnet', substrate: 'steel', units: 1 }],
  stages: stages.map((one, position) => ({ ...one, position })),
  ...part,
});

/** A booking of a stage back to back in its way's phases. */
export function booked(of: OpenStage, from: Date, placeId: string, part: Partial<Booked> = {}): Booked {
  const chosen = of.ways.find(({ id }) => id === part.way) ?? of.ways[0];
  let minute = 0;
  const phases = (chosen?.phases ?? []).map(({ minutes }): [number, number] => [minute, (minute += minutes)]);
  return {
    stageId: of.id,
    way: chosen?.id ?? '',
    placeId,
    personId: null,
    lampIds: [],
    loadId: uuid(),
    from,
    to: new Date(from.getTime() + minute * 60_000),
    phases,
    pinned: false,
    ...part,
  };
}
export const posted = (of: Booked, part: Partial<Booking> = {}): Booking => ({
  ...of,
  id: uuid(),
  planNumber: 1,
  state: 'planned',
  version: 1,
  ...part,
});
export const item = (of: Booked): DraftItem => ({ ...of, id: uuid() });

type Shop = Partial<Omit<Resources, 'shop'>> & { shop?: Partial<Resources['shop']> };

/** Open from 07:00 to 17:00 on weekdays; everybody works then with half an hour's break at 11:00. */
export function facts(
  shop: Shop,
  jobs: OpenJob[],
  part: Partial<Pick<Facts, 'air' | 'coatings'>> & { now?: Date; bookings?: Booking[]; items?: DraftItem[] } = {},
): Facts {
  const people = shop.people ?? [person()];
  const week = { startsLocal: '2026-01-05T07:00', rule: 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR', minutes: 600 };
  const now = part.now ?? MONDAY;
  return {
    now,
    resources: {
      zones: [],
      places: [place()],
      circuits: [],
      lamps: [],
      people,
      openings: [{ id: uuid(), ...week }],
      closures: [],
      shifts: people.map(({ id }) => ({ id: uuid(), personId: id, ...week, breaks: [{ after: 240, minutes: 30 }] })),
      absences: [],
      ...shop,
      shop: {
        id: uuid(),
        name: 'Shop',
        timeZone: ZONE,
        lampMoveMinutes: 5,
        freezeMinutes: 60,
        trainingBlocks: true,
        cleanups: [],
        objective: { tardiness: 10, flow: 1, makespan: 0, booth: 0.1, moves: 5, unplaced: 10_000 },
        changeSeq: 0,
        planNumber: 1,
        ...shop.shop,
      },
    },
    jobs,
    bookings: new Map((part.bookings ?? []).map((b) => [b.stageId, b])),
    draft: part.items
      ? {
          id: uuid(),
          planNumber: 1,
          version: 1,
          cost: null,
          bound: null,
          unplaced: [],
          updatedBy: null,
          updatedAt: now,
          air: null,
        }
      : null,
    items: new Map((part.items ?? []).map((i) => [i.stageId, i])),
    air: part.air ?? { settings: defaultAirSettings, zones: [] },
    coatings: part.coatings ?? new Map(),
  };
}
