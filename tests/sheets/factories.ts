import { emptySheet, type Coating, type CoatingKind, type CoatingSheet } from '#contracts/coatings.ts';
import type { SheetFault, SheetFaultCode } from '#contracts/sheet-faults.ts';
import type { Phase, SheetBody, SheetGround, SheetOption, SheetStage, Way } from '#contracts/sheets.ts';
import { sheetFaults } from '#server/sheets/faults/sheet-faults.ts';

export const hands = (kind: Phase['kind'], minutes: number): Phase => ({ kind, minutes, attendance: 'hands' });
export const alone = (kind: Phase['kind'], minutes: number): Phase => ({ kind, minutes, attendance: 'none' });
export const lit = (minutes: number): Phase => ({ kind: 'bake', minutes, attendance: 'onsite', lamp: true });

export const way = (part: Partial<Way> = {}): Way => ({
  id: 'by-hand',
  label: 'By hand',
  placeKinds: ['prep'],
  stay: false,
  skill: 'prep',
  lampCount: 0,
  family: null,
  load: null,
  gap: { min: 0, max: null, settle: 0 },
  split: false,
  bakeCelsius: null,
  phases: [hands('work', 30)],
  ...part,
});

/** Coats with the same flash between them, as `[spray, flash, spray, ...]`. */
export const coats = (count: number, spray: number, flash: number): Phase[] =>
  Array.from({ length: count }, (_, i) => [...(i > 0 ? [alone('flash', flash)] : []), hands('spray', spray)]).flat();

export const sprayed = (phases: Phase[], part: Partial<Way> = {}): Way =>
  way({ id: 'spray', label: 'Sprayed', placeKinds: ['booth'], skill: 'paint', phases, ...part });

export const boothBake = (celsius: number, minutes: number, part: Partial<Way> = {}): Way =>
  way({
    id: 'booth-bake',
    label: 'Booth bake',
    placeKinds: [],
    stay: true,
    skill: null,
    gap: { min: 10, max: 60, settle: 10 },
    bakeCelsius: celsius,
    phases: [alone('purge', 5), { kind: 'bake', minutes, attendance: 'onsite' }],
    ...part,
  });

export const lampCure = (celsius: number, minutes: number, part: Partial<Way> = {}): Way =>
  way({
    id: 'lamp',
    label: 'Lamp',
    skill: null,
    lampCount: 1,
    gap: { min: 15, max: 240, settle: 15 },
    bakeCelsius: celsius,
    phases: [lit(minutes)],
    ...part,
  });

export const airDry = (part: Partial<Way> = {}): Way =>
  way({
    id: 'air',
    label: 'Air dry',
    placeKinds: ['rack'],
    skill: null,
    gap: { min: 30, max: null, settle: 30 },
    phases: [alone('flash', 180)],
    ...part,
  });

export const stage = (key: string, ways: Way[], part: Partial<SheetStage> = {}): SheetStage => ({
  key,
  kind: key,
  title: key,
  option: null,
  coatingId: null,
  ways,
  ...part,
});

export const option = (key: string, part: Partial<SheetOption> = {}): SheetOption => ({
  key,
  label: key,
  on: false,
  ...part,
});

export const body = (stages: SheetStage[], part: Partial<SheetBody> = {}): SheetBody => ({
  summary: '',
  options: [],
  parts: [{ name: 'Panel', substrate: 'steel', units: 1 }],
  stages,
  ...part,
});

export const COATING = '0190a0a0-0000-7000-8000-0000000000c1';
export const coating = (sheet: Partial<CoatingSheet>, kind: CoatingKind = 'clear'): Coating => ({
  id: COATING,
  name: 'the clear',
  kind,
  sheet: { ...emptySheet, coats: { from: 1, to: 4 }, ...sheet },
});

/** Every code that a test of this file has found so far. */
export const seen = new Set<SheetFaultCode>();

export function allFaults(of: SheetBody, given: { coatings?: Coating[]; ground?: SheetGround } = {}): SheetFault[] {
  const faults = sheetFaults(of, given.coatings ?? [], given.ground ?? null);
  for (const { code } of faults) seen.add(code);
  return faults;
}

export const faultsOf = (of: SheetBody, code: SheetFaultCode, given: Parameters<typeof allFaults>[1] = {}) =>
  allFaults(of, given).filter((fault) => fault.code === code);

export const ground = (part: Partial<SheetGround> = {}): SheetGround => ({
  skills: [{ skill: 'prep', people: 2, trained: 0 }],
  lamps: 1,
  places: [{ kind: 'prep', units: 4, bakes: false, bakeLimitCelsius: null }],
  ...part,
});
