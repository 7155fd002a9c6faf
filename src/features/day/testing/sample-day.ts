import { instantOf } from '#src/lib/wall-clock.ts';
import { minuteMs } from '../model/wall-time.ts';
import type { PhaseKind } from '#contracts/common.ts';
import type { Bar, DayRow, DayView } from '#contracts/day.ts';

/** Test data: a made-up shop's day. Nothing here reaches the built product. */
export const zone = 'Europe/Berlin';
export const day = '2027-03-11';

export const uuid = (kind: number, n: number): string =>
  `0190${kind.toString(16).padStart(4, '0')}-0000-7000-8000-${n.toString(16).padStart(12, '0')}`;
export const at = (minute: number, on = day): string => new Date(instantOf(on, minute, zone)).toISOString();
const plus = (from: string, minutes: number) => new Date(Date.parse(from) + minutes * minuteMs).toISOString();

const plain = { units: null, zone: null, kilowatts: null, circuitId: null, closed: [], working: null };
export const place = (n: number, kind: DayRow['kind'], name: string, more: Partial<DayRow> = {}): DayRow => ({
  ...plain,
  id: uuid(1, n),
  kind,
  name,
  ...more,
});

type Step = [kind: PhaseKind, minutes: number];
const handsOn: PhaseKind[] = ['setup', 'work', 'spray'];

/** A bar that starts at a minute of the sample day; its phases follow one another. */
export function barAt(n: number, start: number, steps: Step[], more: Partial<Bar> = {}): Bar {
  const from = at(start);
  let end = 0;
  const phases = steps.map(([kind, minutes]) => {
    const begin = end;
    end += minutes;
    return {
      kind,
      from: plus(from, begin),
      to: plus(from, end),
      attendance: handsOn.includes(kind) ? ('hands' as const) : ('none' as const),
      lamp: kind === 'bake' && (more.lampIds?.length ?? 0) > 0,
    };
  });
  return {
    id: uuid(2, n),
    jobId: uuid(3, n),
    jobNumber: 2400 + n,
    jobTitle: 'Estate, rear left corner',
    partNames: 'tailgate',
    kind: 'clear',
    title: 'Clear coat',
    way: 'booth',
    wayLabel: 'Booth bake',
    placeId: uuid(1, 1),
    personId: uuid(1, 31),
    personName: 'Ada',
    needsHands: true,
    lampIds: [],
    loadId: uuid(4, n),
    from,
    to: plus(from, end),
    heldTo: plus(from, end),
    phases,
    window: { earliest: null, latest: null },
    pinned: false,
    state: 'planned',
    late: false,
    promiseAt: null,
    chain: [],
    posted: null,
    added: false,
    ...more,
  };
}

export const rows: DayRow[] = [
  place(1, 'booth', 'Booth 1', { units: 4, zone: 'North bay' }),
  place(2, 'booth', 'Booth 2', { units: 6, zone: 'North bay' }),
  place(11, 'prep', 'Prep 1', { units: 1, zone: 'East bay' }),
  place(12, 'prep', 'Prep 2', { units: 1, zone: 'East bay' }),
  place(19, 'rack', 'Rack', { units: 12 }),
  place(21, 'lamp', 'Lamp A', { kilowatts: 6, circuitId: uuid(5, 1) }),
  place(22, 'lamp', 'Lamp B', { kilowatts: 4.5, circuitId: uuid(5, 1) }),
  place(31, 'person', 'Ada', {
    working: [
      { from: at(7 * 60), to: at(12 * 60) },
      { from: at(12 * 60 + 30), to: at(16 * 60) },
    ],
  }),
  place(32, 'person', 'Borys', { working: [{ from: at(8 * 60), to: at(17 * 60) }] }),
];

export function viewOf(bars: Bar[], more: Partial<DayView> = {}): DayView {
  return {
    span: { from: at(0), to: at(1440) },
    serverTime: at(9 * 60 + 31),
    seq: 1,
    shown: 'posted',
    posted: { number: 7, at: at(6 * 60), by: 'Imke', changedAir: [] },
    air: [],
    draft: null,
    open: [{ from: at(7 * 60), to: at(17 * 60) }],
    rows,
    circuits: [{ id: uuid(5, 1), name: 'Circuit 1', kilowatts: 10 }],
    bars,
    unplaced: [],
    run: null,
    ...more,
  };
}
