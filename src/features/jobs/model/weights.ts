/** How much a late promise counts when the planner has to choose: the contract's 1 to 9 in words. */
export const weights = [
  { value: 1, word: 'Ordinary', hint: 'Counts like any other job' },
  { value: 3, word: 'Important', hint: 'Goes before ordinary jobs when not all can be on time' },
  { value: 6, word: 'Firm', hint: 'Somebody is waiting: late only if nothing else helps' },
  { value: 9, word: 'First of all', hint: 'Everything else gives way' },
] as const;

/** The word whose number lies nearest; of two equally near the lighter. */
export function weightOf(value: number): (typeof weights)[number] {
  return weights.reduce((best, each) => (Math.abs(each.value - value) < Math.abs(best.value - value) ? each : best));
}
