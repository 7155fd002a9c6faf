import * as z from 'zod';
import type { Trx } from '#server/db/in-shop.ts';
import type { LetterRow } from '#server/db/letters.ts';
import { findLetterShop, findReader } from '#server/db/readers.ts';
import { planChangedLetter } from '#server/mail/letters/plan-changed.tsx';
import { testLetter } from '#server/mail/letters/test-letter.tsx';
import { trainingEndsLetter } from '#server/mail/letters/training-ends.tsx';
import { linkTo } from '#server/mail/links.ts';
import type { Letter } from '#server/mail/mailer.ts';
import { GiveUp, type JobDeps, type TaskFunction } from '../task-function.ts';
import { deliver } from './deliver.ts';

const slot = z.object({ placeName: z.string(), startsAt: z.string(), endsAt: z.string() });
const planChanged = z.object({
  planNumber: z.number(),
  changes: z.array(
    z.object({
      kind: z.enum(['planned', 'moved', 'taken-off']),
      jobNumber: z.number(),
      jobTitle: z.string(),
      stageTitle: z.string(),
      from: slot.nullable(),
      to: slot.nullable(),
    }),
  ),
});

const trainingEnds = z.object({ personName: z.string(), goodThrough: z.string() });

export const sendLetter: TaskFunction = (deps, task) =>
  deliver(deps, task, (trx, shopId, letter) => compose(deps, trx, shopId, letter));

/** Null where the reader has left the shop. */
async function compose(deps: JobDeps, trx: Trx, shopId: string, letter: LetterRow): Promise<Letter | null> {
  const shop = await findLetterShop(trx, shopId);
  const reader = letter.accountId === null ? undefined : await findReader(trx, shopId, letter.accountId);
  if (!shop || (reader && !reader.isMember)) return null;
  const name = reader?.name ?? letter.to;
  if (letter.kind === 'test') return testLetter({ name, shopName: shop.name, link: linkTo(deps.config).settings() });
  if (letter.kind === 'training-ends')
    return trainingEndsLetter({
      ...trainingEnds.parse(letter.data),
      name,
      shopName: shop.name,
      link: linkTo(deps.config).people(),
    });
  if (letter.kind !== 'plan-changed') throw new GiveUp(`no letter of kind ${letter.kind}`);
  return planChangedLetter({
    ...planChanged.parse(letter.data),
    name,
    shopName: shop.name,
    timeZone: shop.timeZone,
    clock: reader?.clock ?? '24',
    link: linkTo(deps.config).bench(),
  });
}
