import type { Trx } from '#server/db/in-shop.ts';
import { insertJob, takeJobNumber } from '#server/db/jobs.ts';
import { insertStages } from '#server/db/stages.ts';
import { expandSheet } from '#server/sheets/expand-sheet.ts';
import { sheets } from '#server/starter/sheets/index.ts';
import type { DemoCalendar } from './calendar.ts';
import { demoId, spread } from './ids.ts';
import type { JobSeed } from './jobs.ts';
import { accountOf } from './put-in-accounts.ts';
import { storedBody } from './stored-body.ts';

export const jobIdOf = (seed: JobSeed): string => demoId('job', `${seed.title}/${seed.vehicle}`);

/** When it was entered: the day before it arrives, but not later than now or than the plan that has it. */
export function enteredAt(seed: JobSeed, calendar: DemoCalendar, postedAt: Date): Date {
  const minutes = 10 + spread(seed.title, 200);
  const usual = calendar.at(seed.arrives - 1, '08:00').getTime() + minutes * 60_000;
  const latest = (seed.fate === 'new' ? calendar.now : postedAt).getTime() - minutes * 60_000;
  return new Date(Math.min(usual, latest));
}

export async function putInJob(
  trx: Trx,
  shopId: string,
  seed: JobSeed,
  when: { calendar: DemoCalendar; enteredAt: Date },
): Promise<void> {
  const sheet = sheets.find(({ key }) => key === seed.sheet);
  if (!sheet) throw new Error(`The demo has no process sheet ${seed.sheet}.`);
  const { calendar } = when;
  const id = jobIdOf(seed);
  const chosen = [...sheet.options.flatMap(({ key, on }) => (on ? [key] : [])), ...(seed.options ?? [])];
  const parts = (seed.parts ?? sheet.parts).map((part, i) => ({ id: demoId('part', `${id}/${i}`), ...part }));
  const stages = expandSheet(storedBody(sheet), chosen);
  await insertJob(trx, shopId, {
    id,
    number: await takeJobNumber(trx, shopId),
    title: seed.title,
    vehicle: seed.vehicle,
    colourNote: seed.colour ?? '',
    notes: seed.notes ?? '',
    releaseAt: calendar.at(seed.arrives, '07:30'),
    promiseAt: calendar.at(...seed.promised),
    weight: seed.weight ?? 1,
    electric: seed.heat !== undefined,
    heatLimitCelsius: seed.heat?.celsius ?? null,
    heatLimitMinutes: seed.heat?.minutes ?? null,
    sheetVersionId: demoId('sheet', `${sheet.key}/1`),
    createdBy: accountOf('Ennet'),
    parts,
  });
  await trx('job').where({ shop_id: shopId, id }).update({ created_at: when.enteredAt });
  await insertStages(
    trx,
    shopId,
    id,
    stages.map(({ key, ...stage }) => ({ id: demoId('stage', `${id}/${key}`), ...stage })),
  );
}
