/** The demo shop: invented, in a harbour town that is on no map. */
export const shop = {
  name: 'Tarnevoe Paintworks',
  timeZone: 'Europe/Amsterdam',
  lampMoveMinutes: 5,
  freezeMinutes: 60,
  cleanups: [
    { from: 'primer', to: 'colour', minutes: 15 },
    { from: 'colour', to: 'primer', minutes: 10 },
  ],
  objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 5, unplaced: 100_000 },
};

export const weekdays = 'FREQ=WEEKLY;BYDAY=MO,TU,WE,TH,FR';

/** Open from 07:00 to 18:00. */
export const opening = { at: '07:00', minutes: 660 };

type PlaceSeed = {
  name: string;
  kind: 'booth' | 'prep' | 'rack';
  zone: string | null;
  units: number;
  booth?: { limit: number; volume: number; flow: number; clearance: number };
};

/** Prep stations in one bay share their air: what is sprayed in one keeps the lamps off in the other. */
export const places: PlaceSeed[] = [
  {
    name: 'Booth 1',
    kind: 'booth',
    zone: 'Booth 1',
    units: 4,
    booth: { limit: 80, volume: 96, flow: 20_000, clearance: 5 },
  },
  {
    name: 'Booth 2',
    kind: 'booth',
    zone: 'Booth 2',
    units: 6,
    booth: { limit: 60, volume: 64, flow: 4_000, clearance: 4 },
  },
  { name: 'Prep 1', kind: 'prep', zone: 'Quay bay', units: 6 },
  { name: 'Prep 2', kind: 'prep', zone: 'Quay bay', units: 6 },
  { name: 'Prep 3', kind: 'prep', zone: 'Yard bay', units: 6 },
  { name: 'Prep 4', kind: 'prep', zone: 'Yard bay', units: 6 },
  { name: 'Prep 5', kind: 'prep', zone: 'Back bay', units: 4 },
  { name: 'Rack', kind: 'rack', zone: null, units: 14 },
];

/** On the first circuit one lamp at a time may burn, on the second both. */
export const circuits = [
  { name: 'Circuit A', kilowatts: 11 },
  { name: 'Circuit B', kilowatts: 11 },
];
export const lamps = [
  { name: 'Lamp 1', circuit: 'Circuit A', kilowatts: 6, wave: 'short' },
  { name: 'Lamp 2', circuit: 'Circuit A', kilowatts: 6, wave: 'short' },
  { name: 'Lamp 3', circuit: 'Circuit B', kilowatts: 6, wave: 'short' },
  { name: 'Lamp 4', circuit: 'Circuit B', kilowatts: 4.5, wave: 'medium' },
];

export const maintenance = [
  { label: 'Filter change', place: 'Booth 1', at: '07:00', rule: 'FREQ=WEEKLY;BYDAY=TU', minutes: 45 },
  { label: 'Filter change', place: 'Booth 2', at: '07:00', rule: 'FREQ=WEEKLY;BYDAY=TH', minutes: 45 },
];
