import type { SheetBody, SheetOption } from '#contracts/sheets.ts';

/** What may be there or not: a stage or a way. */
type Conditional = { option?: string | null | undefined; unlessOption?: string | undefined };

/** Options as a job names them: a key as often as it is chosen. */
export type Chosen = readonly string[];

export const isThere = ({ option, unlessOption }: Conditional, chosen: Chosen): boolean =>
  (option == null || chosen.includes(option)) && (unlessOption === undefined || !chosen.includes(unlessOption));

export const timesChosen = (chosen: Chosen, key: string): number => chosen.filter((one) => one === key).length;

export const optionsOn = (body: Pick<SheetBody, 'options'>): string[] =>
  body.options.filter(({ on }) => on).map(({ key }) => key);

/** Above so many combinations only the usual choice and each single change of it are looked at. */
const ALL_COMBINED = 128;

/**
 * The choices of options by which a sheet is judged, the usual one first, then those that differ in least. An option that can
 * be chosen several times stands in them once and as often as may be.
 */
export function choicesOf(body: Pick<SheetBody, 'options'>): string[][] {
  const usual = optionsOn(body);
  const changed = (choice: readonly string[], key: string, times: number): string[] => [
    ...choice.filter((one) => one !== key),
    ...Array.from({ length: times }, () => key),
  ];
  const timesOf = ({ on, most = 1 }: SheetOption): number[] => [on ? 0 : 1, ...(most > 1 ? [most] : [])];
  const all = body.options.reduce((product, option) => product * (timesOf(option).length + 1), 1) <= ALL_COMBINED;
  let choices = [usual];
  for (const option of body.options) {
    const from = all ? choices : [usual];
    const more = timesOf(option).flatMap((times) => from.map((choice) => changed(choice, option.key, times)));
    choices = [...choices, ...more];
  }
  const distance = (choice: readonly string[]): number =>
    body.options.filter(({ key, on }) => choice.includes(key) !== on).length;
  return choices
    .map((choice) => ({ choice, far: distance(choice) }))
    .sort((a, b) => a.far - b.far)
    .map(({ choice }) => choice);
}
