import type { Substrate } from '#contracts/common.ts';

type Part = { name: string; substrate: Substrate; units: number };

/**
 * Days count in working days from the present one. `planned` jobs were in the plan that was posted three working days
 * ago; `new` ones came in since and wait for the planner; `withdrawn` was planned and fell out.
 */
export type JobSeed = {
  title: string;
  vehicle: string;
  sheet: string;
  fate: 'planned' | 'new' | 'withdrawn';
  arrives: number;
  promised: [day: number, time: string];
  parts?: Part[];
  /** Options of the sheet other than those that are on by themselves. */
  options?: string[];
  weight?: number;
  colour?: string;
  notes?: string;
  heat?: { celsius: number; minutes: number };
};

const panel = (name: string, substrate: Substrate = 'steel', units = 2): Part[] => [{ name, substrate, units }];
const cap = (name: string): Part[] => [{ name, substrate: 'abs', units: 1 }];

const planned = (seed: Omit<JobSeed, 'fate'>): JobSeed => ({ ...seed, fate: 'planned' });
const fresh = (seed: Omit<JobSeed, 'fate'>): JobSeed => ({ ...seed, fate: 'new' });

export const jobs: JobSeed[] = [
  planned({
    title: 'Front bumper, stone chips',
    vehicle: 'Grey estate',
    sheet: 'bumper',
    arrives: -3,
    promised: [-1, '17:00'],
    parts: panel('Front bumper cover', 'pp-tpo'),
  }),
  planned({
    title: 'Rear bumper, corner',
    vehicle: 'Blue van',
    sheet: 'bumper',
    arrives: -3,
    promised: [0, '12:00'],
    parts: panel('Rear bumper cover', 'pp-tpo'),
  }),
  planned({
    title: 'New front wing',
    vehicle: 'Red hatchback',
    sheet: 'new-panel',
    arrives: -3,
    promised: [-2, '16:00'],
    parts: panel('Front wing, left'),
  }),
  planned({
    title: 'New bonnet',
    vehicle: 'White pick-up',
    sheet: 'new-panel',
    arrives: -3,
    promised: [-1, '12:00'],
    parts: panel('Bonnet'),
    options: ['polish'],
  }),
  planned({
    title: 'Left side, long scrape',
    vehicle: 'Silver saloon',
    sheet: 'full-side',
    arrives: -3,
    promised: [0, '16:30'],
    weight: 2,
    colour: 'Silver, coarse flake: spray-out card first.',
  }),
  planned({
    title: 'Two mirror caps',
    vehicle: 'Black coupe',
    sheet: 'small-parts',
    arrives: -3,
    promised: [-2, '15:00'],
    parts: cap('Mirror caps, pair'),
  }),
  planned({
    title: 'Door handles',
    vehicle: 'Green estate',
    sheet: 'small-parts',
    arrives: -3,
    promised: [-2, '15:00'],
    parts: cap('Door handles, set'),
  }),
  planned({
    title: 'Sill strip',
    vehicle: 'Grey van',
    sheet: 'small-parts',
    arrives: 0,
    promised: [1, '17:00'],
    parts: cap('Sill strip'),
  }),
  planned({
    title: 'Rear wing into door',
    vehicle: 'Dark blue saloon',
    sheet: 'blend',
    arrives: -2,
    promised: [0, '17:00'],
    colour: 'Dark blue, two tones: blend well out.',
  }),
  planned({
    title: 'Rear bumper, parking dent',
    vehicle: 'White hatchback',
    sheet: 'bumper',
    arrives: -2,
    promised: [0, '17:00'],
    parts: panel('Rear bumper cover', 'pp-tpo'),
  }),
  planned({
    title: 'New tailgate skin',
    vehicle: 'Blue estate',
    sheet: 'new-panel',
    arrives: -2,
    promised: [-1, '16:00'],
    parts: panel('Tailgate'),
  }),
  planned({
    title: 'Fuel flap and cap',
    vehicle: 'Red van',
    sheet: 'small-parts',
    arrives: 1,
    promised: [2, '16:00'],
    parts: cap('Fuel flap'),
  }),
  planned({
    title: 'Mirror cap, right',
    vehicle: 'Silver estate',
    sheet: 'small-parts',
    arrives: 1,
    promised: [3, '12:00'],
    parts: cap('Mirror cap'),
  }),
  planned({
    title: 'Four wheels, kerb marks',
    vehicle: 'Black saloon',
    sheet: 'wheels',
    arrives: -1,
    promised: [1, '16:00'],
  }),
  planned({
    title: 'Front door, left',
    vehicle: 'White electric hatchback',
    sheet: 'electric-door',
    arrives: -2,
    promised: [0, '17:00'],
    heat: { celsius: 49, minutes: 45 },
    notes: 'Battery stays in: heat limit from the maker of the vehicle.',
  }),
  planned({
    title: 'Front bumper, cracked tab',
    vehicle: 'Black estate',
    sheet: 'bumper',
    arrives: -1,
    promised: [1, '16:00'],
    parts: panel('Front bumper cover', 'pp-tpo'),
  }),
  planned({
    title: 'Bonnet edge into wing',
    vehicle: 'Grey coupe',
    sheet: 'blend',
    arrives: -1,
    promised: [1, '12:00'],
  }),
  planned({
    title: 'Right side after a post',
    vehicle: 'Blue minibus',
    sheet: 'full-side',
    arrives: 0,
    promised: [1, '09:00'],
    weight: 3,
    notes: 'Promised too early: the customer knows it may slip.',
  }),
  planned({
    title: 'Spoiler lip',
    vehicle: 'Red coupe',
    sheet: 'small-parts',
    arrives: -1,
    promised: [0, '16:00'],
    parts: cap('Spoiler lip'),
  }),
  planned({
    title: 'Rear bumper, scrape',
    vehicle: 'Green hatchback',
    sheet: 'bumper',
    arrives: 0,
    promised: [2, '16:00'],
    parts: panel('Rear bumper cover', 'pp-tpo'),
  }),
  planned({
    title: 'New rear door',
    vehicle: 'White van',
    sheet: 'new-panel',
    arrives: 0,
    promised: [1, '16:00'],
    parts: panel('Rear door, right'),
  }),
  planned({
    title: 'Rear door, right',
    vehicle: 'Grey electric saloon',
    sheet: 'electric-door',
    arrives: 0,
    promised: [2, '17:00'],
    heat: { celsius: 49, minutes: 45 },
  }),
  planned({
    title: 'Mirror caps, pair',
    vehicle: 'Blue hatchback',
    sheet: 'small-parts',
    arrives: 0,
    promised: [1, '17:00'],
    parts: cap('Mirror caps, pair'),
  }),
  planned({
    title: 'Grille frame',
    vehicle: 'Silver van',
    sheet: 'small-parts',
    arrives: 0,
    promised: [1, '17:00'],
    parts: cap('Grille frame'),
  }),
  planned({
    title: 'New front wing, right',
    vehicle: 'Dark green estate',
    sheet: 'new-panel',
    arrives: 1,
    promised: [3, '12:00'],
    parts: panel('Front wing, right'),
  }),
  {
    title: 'Door into rear wing',
    vehicle: 'Yellow hatchback',
    sheet: 'blend',
    fate: 'withdrawn',
    arrives: 1,
    promised: [3, '16:00'],
    notes: 'The customer sells the car as it is.',
  },
  fresh({
    title: 'Front bumper, two scratches',
    vehicle: 'Orange hatchback',
    sheet: 'bumper',
    arrives: 1,
    promised: [4, '16:00'],
    parts: panel('Front bumper cover', 'pp-tpo'),
  }),
  fresh({
    title: 'New boot lid',
    vehicle: 'Grey saloon',
    sheet: 'new-panel',
    arrives: 1,
    promised: [3, '16:00'],
    parts: panel('Boot lid'),
    options: ['polish'],
  }),
  fresh({
    title: 'Handle and cap',
    vehicle: 'White estate',
    sheet: 'small-parts',
    arrives: 0,
    promised: [2, '12:00'],
    parts: cap('Handle and cap'),
  }),
  fresh({
    title: 'Four wheels, recoloured',
    vehicle: 'Blue coupe',
    sheet: 'wheels',
    arrives: 2,
    promised: [5, '16:00'],
  }),
];
