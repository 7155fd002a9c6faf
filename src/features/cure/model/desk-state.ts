export const tabs = ['flash', 'bakes', 'lamp', 'dew', 'circuit', 'trace'] as const;
export type Tab = (typeof tabs)[number];

/**
 * Everything that is typed or chosen on the desk, as text, by its name in the address. Temperatures carry their unit.
 * Air and coating are shared by all tabs. First values: sheet-like times and figures marked from memory where they are used.
 */
export const firstValues = {
  coating: '',
  air: '20C',
  rh: '50',
  damp: '1',
  heatup: '10',
  // A data sheet typed here, for a coating that the shop does not keep.
  between: '10',
  next: '15',
  heat: '15',
  dry: '',
  dryat: '20C',
  bake: '30',
  bakeat: '60C',
  measured: 'metal',
  // Bakes
  min: '30',
  from: '60C',
  to: '50C',
  ea: '',
  bakes: '20*60C',
  rest: '60C',
  // Lamp
  material: 'steel',
  mm: '',
  kw: '2.5',
  wide: '1.2',
  high: '0.8',
  wave: 'short',
  dist: '0.8',
  want: '60C',
  half: '4',
  burn: '20',
  pwide: '1.5',
  phigh: '1',
  battery: 'none',
  batat: '60C',
  // Dew point
  by: 'rh',
  wet: '14C',
  surf: '18C',
  // Circuit
  lamps: 'shop',
  circuit: '',
  kws: '3_3',
  volts: '400',
  phases: '3',
  amps: '16',
  hold: '30',
  eighty: 'yes',
  // Bake trace
  col: '',
  unit: '',
  clock: '',
  done: '0',
  limit: '',
  job: '',
  stage: '',
  trace: '',
} as const;

export type FieldKey = keyof typeof firstValues;
export type Values = Readonly<Record<FieldKey, string>>;
export type DeskState = { tab: Tab; values: Values };

const keys = Object.keys(firstValues) as FieldKey[];
/** Longer than anything one would type; an address is no place to carry a book. */
const longest = 300;

/** What an address says; what it does not say, or says of things unknown, is as at first. */
export function readDesk(search: string): DeskState {
  const params = new URLSearchParams(search);
  const named = params.get('tab');
  const values: Record<FieldKey, string> = { ...firstValues };
  for (const key of keys) values[key] = params.get(key)?.slice(0, longest) ?? firstValues[key];
  return { tab: tabs.find((tab) => tab === named) ?? 'flash', values };
}

/** The address of a view: only what differs from the first values, always in the same order. */
export function writeDesk({ tab, values }: DeskState): string {
  const params = new URLSearchParams();
  if (tab !== 'flash') params.set('tab', tab);
  for (const key of keys) if (values[key] !== firstValues[key]) params.set(key, values[key]);
  return params.toString();
}

/** `20*60C_30*55C`: rows of a small table in one value. Signs that part rows and cells cannot be typed into them. */
export const readRows = (text: string): string[][] => (text === '' ? [] : text.split('_').map((row) => row.split('*')));
export const writeRows = (rows: readonly (readonly string[])[]): string =>
  rows.map((row) => row.map((cell) => cell.replaceAll(/[_*]/g, '')).join('*')).join('_');
