import type { CoatingSheet } from '#contracts/coatings.ts';
import type { Formats } from '#src/lib/formats.ts';

type Say = Pick<Formats, 'duration' | 'temperature'>;

export const coatsText = ({ from, to }: CoatingSheet['coats']): string =>
  from === to ? (from === 1 ? '1 coat' : `${from} coats`) : `${from} to ${to} coats`;

/** The figures one looks a sheet up for, a few words each. */
export function keyFigures(sheet: CoatingSheet, { duration, temperature }: Say): { label: string; text: string }[] {
  const { coats, flashBetweenCoats, flashBeforeNext, recoatWithin, potLife } = sheet;
  const between = coats.to > 1 ? `, ${duration(flashBetweenCoats)} between` : '';
  return [
    { label: 'Coats', text: `${coatsText(coats)}${between}` },
    {
      label: 'Recoat',
      text: recoatText(flashBeforeNext, recoatWithin, duration),
    },
    { label: 'Pot life', text: potLife === null ? 'none' : duration(potLife) },
    { label: 'Cure', text: cureText(sheet, { duration, temperature }) },
  ];
}

function cureText({ airDry, bake, lampShort, lampMedium }: CoatingSheet, { duration, temperature }: Say): string {
  const lines = [
    bake && `${duration(bake.minutes)} at ${temperature(bake.celsius)} ${bake.measuredAt}`,
    lampShort && `${duration(lampShort.minutes)} short wave`,
    lampMedium && `${duration(lampMedium.minutes)} medium wave`,
    airDry && `${duration(airDry.minutes)} in air`,
  ].filter((line) => line !== null);
  return lines.join(' or ') || 'not said';
}

function recoatText(next: number, within: number | null, duration: Say['duration']): string {
  const from = next === 0 ? 'at once' : `from ${duration(next)}`;
  return within === null ? from : `${from} to ${duration(within)}`;
}
