import type { SheetForm } from './sheet-form.ts';

/** The lines of a sheet, to say which of them differ. */
export const fieldWords: Record<keyof SheetForm, string> = {
  name: 'name',
  kind: 'kind',
  maker: 'maker and product',
  edition: 'edition',
  coatsFrom: 'coats at least',
  coatsTo: 'coats at most',
  between: 'flash between coats',
  next: 'flash before the next product',
  heat: 'flash before heat',
  recoat: 'recoat within',
  pot: 'pot life',
  airMinutes: 'air dry',
  airAt: 'air dry at',
  bakeMinutes: 'bake',
  bakeAt: 'bake at',
  measured: 'bake measured in',
  heatUp: 'heat-up',
  shortMinutes: 'short-wave lamp',
  shortMetres: 'short wave at',
  mediumMinutes: 'medium-wave lamp',
  mediumMetres: 'medium wave at',
  limit: 'hottest film',
  holdsFrom: 'holds from',
  holdsTo: 'holds to',
  energy: 'activation energy',
  coldBelow: 'colder than',
  coldFactor: 'cold factor',
  dampAbove: 'damper than',
  dampFactor: 'damp factor',
  cautions: 'cautions',
};

/** What somebody else made of it: `flash between coats 12`, each line that differs. */
export const differences = (before: SheetForm, after: SheetForm): string[] =>
  (Object.keys(fieldWords) as (keyof SheetForm)[])
    .filter((field) => before[field] !== after[field])
    .map((field) => `${fieldWords[field]} ${after[field] === '' ? 'taken off' : after[field]}`);
