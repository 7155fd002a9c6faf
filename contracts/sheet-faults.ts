import * as z from 'zod';

/** What can be wrong with a process sheet. The words are in src/lib/sheet-fault-texts.ts. */
export const sheetFaultCode = z.enum([
  // Names
  'option-unknown',
  'option-twice',
  'stage-twice',
  'way-twice',
  'no-way-left',
  'no-stage-left',
  'coating-unknown',
  // One way by itself
  'no-place',
  'spray-on-rack',
  'lamp-no-lamps',
  'lamps-never-lit',
  'hands-no-skill',
  'heat-no-temperature',
  'no-purge',
  // Coats and flashes within a way
  'flash-short',
  'coats-off-sheet',
  'pot-life',
  'sheet-differs',
  // From stage to stage
  'stay-first',
  'stay-elsewhere',
  'bake-before-flash',
  'recoat-early',
  'window-closed',
  'past-recoat',
  'no-window',
  // Heat
  'above-part',
  'above-film',
  'above-booth',
  'battery-heat',
  'battery-minutes',
  // What the shop has
  'skill-nobody',
  'lamps-too-few',
  'place-kind-missing',
]);
export type SheetFaultCode = z.output<typeof sheetFaultCode>;

/** Which field of a stage or a way a fault is about. */
export const faultField = z.enum([
  'options',
  'stage',
  'coating',
  'option',
  'ways',
  'places',
  'skill',
  'lamps',
  'heat',
  'gap',
  'phases',
]);
export type FaultField = z.output<typeof faultField>;

export const sheetFault = z.strictObject({
  code: sheetFaultCode,
  /** `stop`: such a sheet is not saved; `warn`: it is saved, and the fault is shown. */
  severity: z.enum(['stop', 'warn']),
  /** Keys of the stage and the way it lies in; null: the sheet as a whole, the stage as a whole. */
  stage: z.string().nullable(),
  way: z.string().nullable(),
  field: faultField,
  /** What the sentence speaks of: coatings, options, materials. */
  names: z.array(z.string()),
  /** Minutes and C, as the code has them. */
  figures: z.array(z.number()),
  /** Labels of the options it takes to come, and of those that must be left out; both empty: it is there as the sheet stands. */
  withOptions: z.array(z.string()),
  withoutOptions: z.array(z.string()),
});
export type SheetFault = z.output<typeof sheetFault>;
