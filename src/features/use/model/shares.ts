import type { PlaceUse } from '#contracts/use.ts';

/** What a place did, in the order in which it is stacked and listed: spraying and baking first, holding last. */
export const doings = ['spray', 'bake', 'purge', 'flash', 'cool', 'work', 'setup', 'held'] as const;
export type Doing = (typeof doings)[number];

export type Figures = {
  hours: Record<Doing, number>;
  /** All that something was done, open hours or not. */
  busy: number;
  open: number;
  /** Open hours in which nothing was done. A place that is only held is free of work, though not of a part. */
  free: number;
  /** Busy time inside open hours as a share of open hours, 0 to 1; null where the place was never open. */
  share: number | null;
  /** Busy outside open hours: overtime, cures overnight. */
  outside: number;
  bookings: number;
  recorded: number;
};

type Counted = Pick<PlaceUse, 'hours' | 'openHours' | 'busyOpenHours' | 'bookings' | 'recorded'>;

/** The figures of one place or, summed, of several. */
export function figuresOf(places: readonly Counted[]): Figures {
  const sum = (pick: (place: Counted) => number) => places.reduce((total, place) => total + pick(place), 0);
  const hours = Object.fromEntries(doings.map((doing) => [doing, sum((p) => p.hours[doing])])) as Record<Doing, number>;
  const busy = doings.reduce((total, doing) => total + (doing === 'held' ? 0 : hours[doing]), 0);
  const open = sum((p) => p.openHours);
  const busyOpen = sum((p) => p.busyOpenHours);
  return {
    hours,
    busy,
    open,
    free: Math.max(0, open - busyOpen),
    share: open > 0 ? busyOpen / open : null,
    outside: Math.max(0, busy - busyOpen),
    bookings: sum((p) => p.bookings),
    recorded: sum((p) => p.recorded),
  };
}

export type Segment = { doing: Doing | 'free'; hours: number; left: number; width: number };

/**
 * The stacked bar of a place in per cent of `scale` hours: what it did, then what was left of its open hours. Hours
 * done outside open hours make the bar longer than the open hours, which a mark shows.
 */
export function stackOf(figures: Figures, scale: number): { segments: Segment[]; openMark: number } {
  const percent = (hours: number) => (scale > 0 ? (hours / scale) * 100 : 0);
  let at = 0;
  const segments = ([...doings, 'free'] as const).flatMap((doing): Segment[] => {
    const hours = doing === 'free' ? idleOf(figures) : figures.hours[doing];
    if (hours <= 0) return [];
    const segment = { doing, hours, left: percent(at), width: percent(hours) };
    at += hours;
    return [segment];
  });
  return { segments, openMark: percent(figures.open) };
}

/** Open hours in which the place was neither used nor held, as far as the totals can tell. */
const idleOf = ({ open, busy, hours }: Figures): number => Math.max(0, open - busy - hours.held);

/** The longest bar decides the scale that all places share, so that bars can be compared. */
export const scaleOf = (all: readonly Figures[]): number =>
  Math.max(1, ...all.map((f) => Math.max(f.open, f.busy + f.hours.held)));

/** Hours to one decimal place; a little is not nothing. */
export function hoursText(hours: number): string {
  if (hours === 0) return '0';
  return hours < 0.05 ? '<0.1' : hours.toFixed(1);
}

export const shareText = (share: number | null): string => (share === null ? 'n/a' : `${Math.round(share * 100)} %`);
