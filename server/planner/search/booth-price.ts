import { costOf } from '../engine/run-cost.ts';
import type { Search } from './candidate.ts';

/** The cost of the schedule held by the problem's own objective. */
export const plainCost = ({ cost, d, ledger }: Search): number => cost - ledger.boothPrice * d.state.boothMinutes;

/**
 * Asks another price for a minute of booth on top of the objective; what is held costs accordingly. Where booths are the
 * bottleneck, a job that is late by a night fits in before it only once all others leave room: the price makes a slope
 * where the objective itself is flat.
 */
export function setBoothPrice(s: Search, price: number): void {
  s.ledger.boothPrice = price;
  s.cost = costOf(s.d, s.ledger);
}
