import type { Facts } from './facts.ts';
import { judge, type Judged } from './judge.ts';
import { frameOf } from './problem/build-problem.ts';

/** A draft that was made and read a moment ago may still be posted: work begins when somebody taps, not by the second. */
const POSTING_GRACE_MINUTES = 15;

/** Holds the draft against every rule as it would be posted now. */
export function judgeForPosting(facts: Facts): Judged {
  const now = new Date(facts.now.getTime() - POSTING_GRACE_MINUTES * 60_000);
  return judge(facts, frameOf(facts), { loose: new Set(), now });
}
