/** What the formulas read of a coating's data sheet, in C and whole minutes; null: the sheet says nothing of it. */
export type SheetFigures = {
  coats: { from: number; to: number };
  flashBetweenCoats: number;
  flashBeforeNext: number;
  flashBeforeHeat: number;
  recoatWithin: number | null;
  potLife: number | null;
  airDry: { minutes: number; celsius: number } | null;
  bake: { minutes: number; celsius: number; measuredAt: 'metal' | 'air'; heatUp?: number | undefined } | null;
  lampShort: { minutes: number; metres: number } | null;
  lampMedium: { minutes: number; metres: number } | null;
  heatLimitCelsius: number | null;
  holds: { from: number; to: number } | null;
  kilojoulesPerMole: number | null;
  coldAir: { belowCelsius: number; factor: number } | null;
  dampAir: { abovePercent: number; factor: number } | null;
};

export type MinutesSource =
  'coat' | 'flash-between' | 'flash-next' | 'flash-heat' | 'bake' | 'lamp-short' | 'lamp-medium' | 'air';
