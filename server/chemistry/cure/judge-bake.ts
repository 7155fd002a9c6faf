import { HAIR } from '#chemistry/constants.ts';
import type { Finding } from '#chemistry/finding.ts';
import { temperature, zeroOrMore } from '#chemistry/quantity.ts';
import { minutesStillToCure, type CureCode } from './cure-minutes-at.ts';
import { equivalentMinutes } from './equivalent-minutes.ts';
import type { Kinetics } from './kinetics.ts';
import type { Trace } from './trace.ts';

export type BakeJudgement = {
  cured: boolean;
  /** Earlier bakes and this one, in minutes at the reference temperature, against what the sheet asks. */
  doneReferenceMinutes: number;
  neededReferenceMinutes: number;
  /** Still to bake at the reference temperature; 0 when cured. */
  leftReferenceMinutes: number;
  peakCelsius: number | null;
  /** Longest stretch between two rows: a straight line is assumed across it. */
  longestGapMinutes: number;
  findings: Finding<CureCode | 'above-heat-limit'>[];
};

export type BakeEvidence = {
  trace: Trace;
  /** Earned by earlier bakes of the same coat. */
  earlierReferenceMinutes?: number;
  /** The part's or vehicle's limit, where one is known. */
  limitCelsius?: number | null;
};

/** A recorded bake held against its data sheet. */
export function judgeBake(kinetics: Kinetics, evidence: BakeEvidence): BakeJudgement {
  const { trace, earlierReferenceMinutes = 0, limitCelsius = null } = evidence;
  const done = zeroOrMore('earlierReferenceMinutes', earlierReferenceMinutes) + equivalentMinutes(trace, kinetics);
  const { peakCelsius, longestGapMinutes } = extremes(trace);
  // Room temperature is part of every bake, so only the hot end of the printed range is worth a word here.
  const left = minutesStillToCure(kinetics, done, kinetics.referenceCelsius);
  const findings: BakeJudgement['findings'] = [...left.findings];
  if (peakCelsius !== null && peakCelsius > kinetics.hottestCelsius) {
    findings.push({ code: 'above-printed-temperatures', value: peakCelsius, limit: kinetics.hottestCelsius });
  }
  if (limitCelsius !== null && peakCelsius !== null && peakCelsius > temperature('limitCelsius', limitCelsius) + HAIR) {
    findings.push({ code: 'above-heat-limit', value: peakCelsius, limit: limitCelsius });
  }
  const cured = done >= kinetics.referenceMinutes * (1 - HAIR);
  return {
    cured,
    doneReferenceMinutes: done,
    neededReferenceMinutes: kinetics.referenceMinutes,
    leftReferenceMinutes: cured ? 0 : left.minutes,
    peakCelsius,
    longestGapMinutes,
    findings,
  };
}

function extremes(trace: Trace): { peakCelsius: number | null; longestGapMinutes: number } {
  let peakCelsius: number | null = null;
  let longestGapMinutes = 0;
  let before: number | null = null;
  for (const { minutes, metalCelsius } of trace) {
    if (peakCelsius === null || metalCelsius > peakCelsius) peakCelsius = metalCelsius;
    if (before !== null) longestGapMinutes = Math.max(longestGapMinutes, minutes - before);
    before = minutes;
  }
  return { peakCelsius, longestGapMinutes };
}
