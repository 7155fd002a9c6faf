import { restore } from '../engine/keep.ts';
import { forgetTouched } from '../engine/placer.ts';
import { OUT } from '../engine/run-cost.ts';
import { copyStage, makePlacing, type Placing } from '../engine/state.ts';
import { type Genes, settleHeld, type Search } from './candidate.ts';

/** A whole schedule put aside, to be stood on again. */
export type Kept = {
  cost: number;
  genes: Genes;
  placing: Placing;
  pins: Int32Array;
  out: Uint8Array;
  outStage: Int32Array;
};

export function makeKept({ d, held }: Search): Kept {
  const { shop } = d;
  return {
    cost: Infinity,
    genes: {
      order: held.order.slice(),
      choice: held.choice.slice(),
      hand: held.hand.slice(),
      spot: held.spot.slice(),
      wish: held.wish.slice(),
      ring: held.ring.slice(),
    },
    placing: makePlacing(shop),
    pins: new Int32Array(shop.stageCount),
    out: new Uint8Array(shop.jobs.length),
    outStage: new Int32Array(shop.jobs.length),
  };
}

/** Copies the schedule that the search stands on. */
export function keepHeld(s: Search, kept: Kept): void {
  const { shop } = s.d;
  kept.cost = s.cost;
  kept.genes.order.set(s.held.order);
  kept.genes.choice.set(s.held.choice);
  kept.genes.hand.set(s.held.hand);
  kept.genes.spot.set(s.held.spot);
  kept.genes.wish.set(s.held.wish);
  kept.genes.ring.set(s.held.ring);
  for (let k = 0; k < shop.stageCount; k++) copyStage(shop, s.heldPlacing, kept.placing, k);
  kept.pins.set(s.heldPins);
  kept.out.set(s.heldOut);
  kept.outStage.set(s.heldOutStage);
}

/** Stands on a kept schedule again, exactly as it was. */
export function standOn(s: Search, kept: Kept): void {
  const { d, held } = s;
  const { shop } = d;
  forgetTouched(d);
  for (let k = 0; k < shop.stageCount; k++) {
    if (shop.fixedAt[k]! >= 0) continue;
    restore(d, k, kept.placing);
    copyStage(shop, kept.placing, s.heldPlacing, k);
  }
  held.order.set(kept.genes.order);
  held.choice.set(kept.genes.choice);
  held.hand.set(kept.genes.hand);
  held.spot.set(kept.genes.spot);
  held.wish.set(kept.genes.wish);
  held.ring.set(kept.genes.ring);
  s.heldPins.set(kept.pins);
  s.heldOut.set(kept.out);
  s.heldOutStage.set(kept.outStage);
  s.cost = kept.cost;
  settleHeld(s);
}

/** The cost without what a job left out adds in the search. */
export const costShown = (kept: Kept): number => kept.cost - OUT * kept.out.reduce((x, y) => x + y, 0);
