import type { Rule } from '../plan-view.ts';

/** Rule 3: a stage that stays is where the previous one left the part. (How long a place is held: `plan-view.ts`.) */
export const staying: Rule = (view, report) => {
  for (const { at, mode, previous } of view.sound)
    if (mode.stay && previous?.place !== at.place) report('moved-while-staying', at.stage, [at.place]);
};
