import type { Reason } from '#contracts/reasons.ts';
import type { BookedWork } from '../db/booked-on.ts';
import { Refusal } from '../errors.ts';

/** As many as fit on a screen; how many there are in all stands with each. */
const mostTold = 50;

/** Refused because posted work is still to be done there; each stage is told with its day. */
export const stillBooked = (name: string, booked: readonly BookedWork[]): Refusal =>
  new Refusal('refused', {
    reasons: booked.slice(0, mostTold).map((one): Reason => ({
      code: 'still-booked',
      rule: null,
      stageId: one.stageId,
      ids: [one.jobId],
      names: [name, `${one.jobNumber} ${one.jobTitle}, ${one.stageTitle}`],
      at: [one.from.toISOString(), one.to.toISOString()],
      minutes: [booked.length],
    })),
  });

/** Refused because other things of the set-up still name it. */
export const stillUsedBy = (name: string, users: readonly { id: string; name: string }[]): Refusal =>
  new Refusal('refused', {
    reasons: [
      {
        code: 'still-used-by',
        rule: null,
        stageId: null,
        ids: users.map(({ id }) => id),
        names: [name, ...users.map((user) => user.name)],
        at: [],
        minutes: [],
      },
    ],
  });
