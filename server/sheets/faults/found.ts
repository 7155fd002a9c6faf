import type { Coating } from '#contracts/coatings.ts';
import type { FaultField, SheetFault, SheetFaultCode } from '#contracts/sheet-faults.ts';
import type { SheetBody, SheetGround, Way } from '#contracts/sheets.ts';
import type { SettledStage } from '../expand-sheet.ts';

/** A fault as it is found in one choice of options. */
export type Found = Omit<SheetFault, 'withOptions' | 'withoutOptions'>;

/** What a sheet is held against. Without the ground nothing is said of roster, lamps and places. */
export type Given = { coatings: ReadonlyMap<string, Coating>; ground: SheetGround | null };

/** A sheet with one choice of its options made. */
export type Variant = Given & { parts: SheetBody['parts']; stages: readonly SettledStage[] };

type More = { names?: readonly string[]; figures?: readonly number[] };

export const found = (
  code: SheetFaultCode,
  severity: SheetFault['severity'],
  at: { stage: string | null; way?: string | null; field: FaultField },
  { names = [], figures = [] }: More = {},
): Found => ({
  code,
  severity,
  stage: at.stage,
  way: at.way ?? null,
  field: at.field,
  names: [...names],
  figures: [...figures],
});

/** Finds for a way of the stage; `stop` and `warn` with the same arguments. */
export const inWay = (stage: SettledStage, way: Way) => ({
  stop: (code: SheetFaultCode, field: FaultField, more: More = {}): Found =>
    found(code, 'stop', { stage: stage.key, way: way.id, field }, more),
  warn: (code: SheetFaultCode, field: FaultField, more: More = {}): Found =>
    found(code, 'warn', { stage: stage.key, way: way.id, field }, more),
});

export const coatingOf = (stage: SettledStage | undefined, { coatings }: Given): Coating | null =>
  (stage?.coatingId != null && coatings.get(stage.coatingId)) || null;
