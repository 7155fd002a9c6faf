import { DEFAULT_WINDOWS, POT_LIFE_MINUTES, type DefaultRange } from '#chemistry/defaults/default-windows.ts';
import type { CoatKind } from '#chemistry/windows/missed-window.ts';
import type { CoatingKind } from '#contracts/coatings.ts';
import type { SheetForm } from './sheet-form.ts';
import { typedMinutes, typedTemperature } from './typed-figures.ts';

const practiceOf: Partial<Record<CoatingKind, CoatKind>> = {
  promoter: 'adhesion-promoter',
  primer: 'primer',
  'epoxy-primer': 'primer',
  filler: 'primer',
  sealer: 'sealer',
  base: 'base',
  clear: 'clear',
  'single-stage': 'clear',
};

type Offer = { label: string; said: string; fill: Partial<SheetForm> };

/** What is usual for a kind, the longer end of each wait; none where nothing is known. Every one of them is to be checked. */
export function offersFor(kind: CoatingKind, unit: 'C' | 'F'): Offer[] {
  const like = practiceOf[kind];
  if (like === undefined) return [];
  const usual = DEFAULT_WINDOWS[like];
  const offers: Offer[] = [];
  const offer = (
    label: string,
    range: DefaultRange | null,
    said: (text: string) => string,
    fill: (range: DefaultRange) => Partial<SheetForm>,
  ) => {
    if (range) offers.push({ label, said: said(span(range)), fill: fill(range) });
  };
  const minutes = (text: string) => `${text} min`;
  offer(
    'Coats',
    usual.coats,
    (text) => text,
    ({ from, to }) => ({ coatsFrom: String(from), coatsTo: String(to) }),
  );
  offer('Between coats', usual.minutesBetweenCoats, minutes, ({ to }) => ({ between: String(to) }));
  offer('Before the next or heat', usual.minutesBeforeNext, minutes, ({ to }) => ({
    next: String(to),
    heat: String(to),
  }));
  offer(
    'Recoat within',
    usual.recoatWindowHours,
    (text) => `${text} h`,
    ({ from }) => ({ recoat: typedMinutes(from * 60) }),
  );
  const at60 = typedTemperature(60, unit);
  offer(
    'Bake, metal',
    usual.bakeMinutesAt60Celsius,
    (text) => `${text} min at ${at60} °${unit}`,
    ({ to }) => ({
      bakeMinutes: String(to),
      bakeAt: at60,
      measured: 'metal' as const,
    }),
  );
  offer('Short-wave lamp', usual.shortWaveLampMinutes, minutes, ({ to }) => ({
    shortMinutes: String(to),
    shortMetres: '0.7',
  }));
  const at20 = typedTemperature(20, unit);
  offer('Air dry', usual.airDryMinutes, minutes, ({ to }) => ({ airMinutes: typedMinutes(to), airAt: at20 }));
  if (like === 'clear') offer('Pot life', POT_LIFE_MINUTES, minutes, ({ from }) => ({ pot: String(from) }));
  return offers;
}

const span = ({ from, to }: DefaultRange): string => (from === to ? String(from) : `${from} to ${to}`);

/** Only over what was left empty, or stands as a new sheet begins; nothing typed is lost. */
export function filledIn(form: SheetForm, untouched: SheetForm, offers: readonly Offer[]): Partial<SheetForm> {
  const all = Object.assign({}, ...offers.map(({ fill }) => fill)) as Partial<SheetForm>;
  return Object.fromEntries(
    Object.entries(all).filter(([key]) => {
      const field = key as keyof SheetForm;
      return form[field].trim() === '' || form[field] === untouched[field];
    }),
  );
}
