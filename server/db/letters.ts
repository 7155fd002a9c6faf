import { v7 as uuid } from 'uuid';
import type { Scope, Trx } from './in-shop.ts';
import { enqueue } from './tasks.ts';

export type PlanSlot = { placeName: string; startsAt: string; endsAt: string };

/** What a newly posted plan changes for one person, in order of time. Instants are ISO 8601. */
export type PlanChangedData = {
  planNumber: number;
  changes: {
    kind: 'planned' | 'moved' | 'taken-off';
    jobNumber: number;
    jobTitle: string;
    stageTitle: string;
    /** Where it was; null where it is new. */
    from: PlanSlot | null;
    /** Where it is now; null where it was taken off. */
    to: PlanSlot | null;
  }[];
};
export type InvitationData = { invitationId: string };
/** Sent to who asks for it, to see that letters arrive. */
export type TestData = { askedAt: string };

/** The day is the last on which the training is good; for this kind the version is that day as a number. */
export type TrainingEndsData = { personName: string; goodThrough: string };

/** Kinds of letters a shop sends and what each is made of. Names, zone and clock of the reader are looked up when sent. */
export type LetterData = {
  'training-ends': TrainingEndsData;
  'plan-changed': PlanChangedData;
  invitation: InvitationData;
  test: TestData;
};
export type LetterKind = keyof LetterData;

/**
 * Puts a letter into the shop's outbox within the caller's transaction. The same kind, subject and version goes to an
 * address once. For `plan-changed` the subject is the person and the version the plan's number.
 */
export async function queueLetter<K extends LetterKind>(
  trx: Trx,
  scope: Scope,
  letter: {
    kind: K;
    accountId: string | null;
    toEmail: string;
    subjectId: string;
    subjectVersion: number;
    data: LetterData[K];
  },
): Promise<void> {
  const id = uuid();
  const inserted = await trx('letter')
    .insert({
      shop_id: scope.shopId,
      id,
      kind: letter.kind,
      account_id: letter.accountId,
      to_email: letter.toEmail,
      subject_id: letter.subjectId,
      subject_version: letter.subjectVersion,
      data: JSON.stringify(letter.data),
    })
    .onConflict(['shop_id', 'kind', 'subject_id', 'subject_version', 'to_email'])
    .ignore()
    .returning('id');
  if (inserted.length === 0) return;
  const kind = letter.kind === 'invitation' ? 'send-invitation' : 'send-letter';
  await enqueue(trx, { kind, key: id, shopId: scope.shopId, payload: { letterId: id } });
}

export type LetterState = 'queued' | 'sent' | 'dropped' | 'dead';
export type LetterRow = {
  id: string;
  kind: string;
  accountId: string | null;
  to: string;
  state: LetterState;
  data: unknown;
};

export const findLetter = (trx: Trx, shopId: string, id: string): Promise<LetterRow | undefined> =>
  trx('letter').where({ shop_id: shopId, id }).first<LetterRow | undefined>({
    id: 'id',
    kind: 'kind',
    accountId: 'account_id',
    to: 'to_email',
    state: 'state',
    data: 'data',
  });

export async function setLetterState(
  trx: Trx,
  shopId: string,
  id: string,
  now: { state: LetterState; lastError: string | null; sentAt: Date | null },
): Promise<void> {
  await trx('letter')
    .where({ shop_id: shopId, id })
    .update({ state: now.state, last_error: now.lastError, sent_at: now.sentAt });
}

export type ListedLetter = {
  id: string;
  kind: string;
  to: string;
  state: LetterState;
  createdAt: Date;
  sentAt: Date | null;
  lastError: string | null;
};

/** The newest 500 letters of the shop, in one state or in all. */
export const listLetters = (trx: Trx, shopId: string, state: LetterState | undefined): Promise<ListedLetter[]> =>
  trx('letter')
    .where({ shop_id: shopId, ...(state !== undefined && { state }) })
    .orderBy([
      { column: 'created_at', order: 'desc' },
      { column: 'id', order: 'desc' },
    ])
    .limit(500)
    .select<ListedLetter[]>({
      id: 'id',
      kind: 'kind',
      to: 'to_email',
      state: 'state',
      createdAt: 'created_at',
      sentAt: 'sent_at',
      lastError: 'last_error',
    });
