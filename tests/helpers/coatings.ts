import { randomUUID } from 'node:crypto';
import { emptySheet, type Coating, type CoatingSheet } from '#contracts/coatings.ts';

/** A medium-solid clear as common practice has it. */
export const clear: CoatingSheet = {
  ...emptySheet,
  coats: { from: 2, to: 2 },
  flashBetweenCoats: 10,
  flashBeforeHeat: 12,
  recoatWithin: 1440,
  potLife: 120,
  airDry: { minutes: 720, celsius: 20 },
  bake: { minutes: 30, celsius: 60, measuredAt: 'metal' },
  cautions: ['Holds isocyanate, so: air-fed.'],
};

export const aNewCoating = (given: Partial<Coating> = {}): Coating => ({
  id: randomUUID(),
  name: 'Medium-solid clear',
  kind: 'clear',
  sheet: clear,
  ...given,
});
