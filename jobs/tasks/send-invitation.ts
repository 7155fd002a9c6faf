import * as z from 'zod';
import type { Trx } from '#server/db/in-shop.ts';
import type { LetterRow } from '#server/db/letters.ts';
import { findLetterShop } from '#server/db/readers.ts';
import { findOpenInvitationById, setInvitationHash } from '#server/db/tokens.ts';
import { invitationLetter } from '#server/mail/letters/invitation.tsx';
import { linkTo } from '#server/mail/links.ts';
import type { Letter } from '#server/mail/mailer.ts';
import { hashOf, tokenFor } from '#server/services/one-time-token.ts';
import type { JobDeps, TaskFunction } from '../task-function.ts';
import { deliver } from './deliver.ts';

const data = z.object({ invitationId: z.uuid() });
const dayInMilliseconds = 86_400_000;

/** The link's hash commits before the letter leaves, so that no letter is out whose link does not work. */
export const sendInvitation: TaskFunction = (deps, task) =>
  deliver(deps, task, (trx, shopId, letter) => compose(deps, trx, shopId, letter));

/** Null where the invitation was accepted, withdrawn or ran out. */
async function compose(deps: JobDeps, trx: Trx, shopId: string, letter: LetterRow): Promise<Letter | null> {
  const { invitationId } = data.parse(letter.data);
  const invitation = await findOpenInvitationById(trx, shopId, invitationId, deps.now());
  const shop = await findLetterShop(trx, shopId);
  if (!invitation || !shop) return null;
  const token = tokenFor(deps.config, 'invitation', invitation.id);
  await setInvitationHash(trx, shopId, invitation.id, hashOf(token));
  return invitationLetter({
    shopName: shop.name,
    role: invitation.role,
    link: linkTo(deps.config).invitation(token),
    goodForDays: Math.ceil((invitation.expiresAt.getTime() - deps.now().getTime()) / dayInMilliseconds),
  });
}
