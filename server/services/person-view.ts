import type { Clash, Person } from '#contracts/people.ts';
import { trainingStanding } from '#chemistry/training/spray-training.ts';
import type { Trx } from '../db/in-shop.ts';
import { findPerson, findShopFrame, type PersonRow } from '../db/people.ts';
import { handsOfPerson } from '../db/person-booked.ts';
import { loadResources } from '../db/resources.ts';
import { workingSpans } from '../planning/calendars.ts';
import { localDayOf } from '../planning/local-time.ts';
import { subtractSpans } from '../planning/spans.ts';
import { notFound } from '../errors.ts';

const DAY = 86_400_000;

/** A person as the roster shows them. `today` is the shop's calendar day, by which training is judged. */
export const personView = (row: PersonRow, today: string): Person => ({
  ...row,
  training: trainingView(row.sprayTrainedOn, today),
  absences: row.absences.map(({ from, to, ...rest }) => ({
    ...rest,
    from: new Date(from).toISOString(),
    to: to === null ? null : new Date(to).toISOString(),
  })),
});

function trainingView(trained: string | null, today: string): Person['training'] {
  const standing = trainingStanding(trained, today);
  switch (standing.code) {
    case 'good':
    case 'ends-soon':
      return { standing: standing.code, goodThrough: standing.goodThrough, daysLeft: standing.daysLeft };
    case 'lapsed':
      return { standing: 'lapsed', goodThrough: standing.goodThrough, daysLeft: -standing.daysOver };
    case 'not-yet':
    case 'never-trained':
      return { standing: standing.code, goodThrough: null, daysLeft: null };
    default:
      return standing satisfies never;
  }
}

/** @throws {Refusal} not-found */
export async function personInShop(trx: Trx, shopId: string, id: string, now: Date): Promise<Person> {
  const row = await findPerson(trx, shopId, id);
  if (!row) throw notFound();
  const { timeZone } = await findShopFrame(trx, shopId);
  return personView(row, localDayOf(now, timeZone));
}

/** Posted work whose time for this pair of hands no longer lies in the person's hours. */
export async function clashesOf(trx: Trx, shopId: string, personId: string, now: Date): Promise<Clash[]> {
  const hands = await handsOfPerson(trx, shopId, personId, now);
  const last = hands.reduce((to, one) => Math.max(to, one.to.getTime()), 0);
  if (last === 0) return [];
  const setUp = await loadResources(trx, shopId);
  const first = Math.min(...hands.map(({ from }) => from.getTime()));
  const working = workingSpans(setUp, personId, { from: new Date(first - DAY), to: new Date(last + DAY) });
  const outside = hands.filter((span) => subtractSpans([span], working).length > 0);
  // Once a stage, from its first stretch outside of the hours.
  const byStage = new Map(outside.toReversed().map((one) => [one.stageId, one]));
  return [...byStage.values()]
    .sort((a, b) => a.from.getTime() - b.from.getTime())
    .map((one) => ({ ...one, from: one.from.toISOString(), to: one.to.toISOString() }));
}
