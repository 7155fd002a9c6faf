import { limitForDisplay } from '#chemistry/units/temperature.ts';

/** Why a way cannot be offered. Figures in C and minutes, as named. */
export type WayRefusal =
  | { code: 'heat-limit'; figures: [wanted: number, limit: number] }
  | { code: 'heat-minutes'; figures: [wanted: number, left: number] }
  | { code: 'heat-unknown'; figures: [] }
  | { code: 'booth-heat'; figures: [wanted: number] }
  | { code: 'purge-unknown'; figures: [] }
  | { code: 'no-purge'; figures: [] }
  | { code: 'no-place'; figures: [] }
  | { code: 'does-not-fit'; figures: [wanted: number, most: number] }
  | { code: 'no-person'; figures: []; skill: string }
  | { code: 'no-trained-person'; figures: []; skill: string }
  | { code: 'no-lamps'; figures: [wanted: number, there: number] }
  | { code: 'nothing-to-stay-on'; figures: [] }
  | { code: 'flash-past-window'; figures: [wanted: number, most: number] };

// Rounded down, so that a limit never reads higher than it is.
const degrees = (celsius: number): string => `${limitForDisplay(celsius, 1)} C`;

/** A plain sentence for the list of unplaced jobs. */
export function sayRefusal(refusal: WayRefusal): string {
  switch (refusal.code) {
    case 'heat-limit':
      return `bakes at ${degrees(refusal.figures[0])}, above the heat limit of ${degrees(refusal.figures[1])} of this vehicle or part`;
    case 'heat-minutes':
      return `needs ${refusal.figures[0]} min of heat, and the vehicle has ${refusal.figures[1]} min left in all its bakes`;
    case 'heat-unknown':
      return 'heats, and its temperature is not known, so that no limit of part or vehicle can be kept';
    case 'booth-heat':
      return `no booth may bake at ${degrees(refusal.figures[0])}`;
    case 'purge-unknown':
      return 'no heat without a known purge: enter volume and air flow of the booth';
    case 'no-purge':
      return 'its sheet leaves no time for the purge before heat';
    case 'no-place':
      return 'no place of the kind it needs';
    case 'does-not-fit':
      return `takes ${refusal.figures[0]} units of room, the largest place has ${refusal.figures[1]}`;
    case 'no-person':
      return `nobody on the roster has the skill ${refusal.skill}`;
    case 'no-trained-person':
      return `nobody with the skill ${refusal.skill} has spray training that is still good`;
    case 'no-lamps':
      return `needs ${refusal.figures[0]} lamps, the shop has ${refusal.figures[1]}`;
    case 'nothing-to-stay-on':
      return 'is done where the part stands, but nothing comes before it';
    case 'flash-past-window':
      return `has to flash ${refusal.figures[0]} min in the air expected there, past the ${refusal.figures[1]} min of its window`;
  }
}

/** One sentence for a stage that has no way left. */
export const sayNoWay = (refused: readonly { label: string; refusal: WayRefusal }[]): string =>
  `No way is left: ${refused.map(({ label, refusal }) => `${label} ${sayRefusal(refusal)}`).join('; ')}.`;
