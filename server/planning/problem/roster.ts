import { parseDay, formatDay } from '#chemistry/training/calendar-day.ts';
import { trainingGoodThrough } from '#chemistry/training/spray-training.ts';
import type { Person } from '#planner/types.ts';
import type { PersonSetUp, Resources } from '#server/db/resources.ts';
import { workingSpans } from '../calendars.ts';
import { instantOf, readLocal } from '../local-time.ts';
import { clipSpan, subtractSpans, type Span } from '../spans.ts';
import type { Clock } from './clock.ts';

const APART = '~untrained';

/**
 * The people of a problem. Somebody whose spray training begins or lapses inside the horizon is there twice, with working
 * hours that never meet: trained, and not. So a spray stage is only ever given to the trained one.
 */
export type Roster = {
  people: Person[];
  /** The problem's ids of those with a skill (null: none asked), `spraying`: only as far as their training is good. */
  who(skill: string | null, spraying: boolean): string[];
  /** The problem's id of a person at a time. */
  idAt(personId: string, at: Date): string;
};

/** The person behind a problem's id. */
export const personOf = (id: string): string => (id.endsWith(APART) ? id.slice(0, -APART.length) : id);

type Entry = { person: PersonSetUp; trained: Span | null; pieces: { id: string; spans: Span[]; sprays: boolean }[] };

export function rosterOf(resources: Resources, range: Span, clock: Clock): Roster {
  const entries = new Map(resources.people.map((person) => [person.id, entryOf(resources, person, range)]));
  const pieces = [...entries.values()].flatMap((entry) => entry.pieces.map((piece) => ({ ...piece, entry })));
  return {
    people: pieces.map(({ id, spans }) => ({ id, working: clock.free(spans) })),
    who: (skill, spraying) =>
      pieces
        .filter(({ entry: { person }, sprays }) => {
          const able = skill === null || person.skills.includes(skill);
          return able && !person.retired && (sprays || !spraying);
        })
        .map(({ id }) => id),
    idAt: (personId, at) => {
      const entry = entries.get(personId);
      if (!entry || entry.pieces.length < 2) return personId;
      const inside = entry.trained !== null && at >= entry.trained.from && at < entry.trained.to;
      return inside ? personId : personId + APART;
    },
  };
}

function entryOf(resources: Resources, person: PersonSetUp, range: Span): Entry {
  const trained = trainedSpan(resources, person, range);
  const working = workingSpans(resources, person.id, range);
  const apart = trained === null ? working : subtractSpans(working, [trained]);
  const sprays = trained === null ? [] : working.flatMap((span) => clipSpan(span, trained) ?? []);
  const whole = { id: person.id, spans: working };
  if (apart.length === 0) return { person, trained, pieces: [{ ...whole, sprays: trained !== null }] };
  if (sprays.length === 0) return { person, trained, pieces: [{ ...whole, sprays: false }] };
  return {
    person,
    trained,
    pieces: [
      { id: person.id, spans: sprays, sprays: true },
      { id: person.id + APART, spans: apart, sprays: false },
    ],
  };
}

/** When a person may spray: five years from the training, by the shop's calendar (40 CFR 63.11173). */
function trainedSpan({ shop }: Resources, person: PersonSetUp, range: Span): Span | null {
  if (!shop.trainingBlocks) return range;
  if (person.sprayTrainedOn === null) return null;
  const midnight = (day: string): Date => instantOf(readLocal(`${day}T00:00`), shop.timeZone);
  const last = parseDay('goodThrough', trainingGoodThrough(person.sprayTrainedOn));
  const end = new Date(Date.UTC(last.year, last.month - 1, last.day + 1));
  const dayAfter = formatDay({ year: end.getUTCFullYear(), month: end.getUTCMonth() + 1, day: end.getUTCDate() });
  return clipSpan({ from: midnight(person.sprayTrainedOn), to: midnight(dayAfter) }, range);
}
