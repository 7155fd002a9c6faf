import * as z from 'zod';
import type { Filter, FilterFields, FilterStanding } from '#contracts/upkeep.ts';
import { typedMaybe, typedName, typedOf } from '../../parts/typed.ts';
import { readWith, type FormRead } from '../../parts/use-typed-form.ts';

export type FilterForm = {
  placeId: string;
  name: string;
  hours: string;
  days: string;
  pascals: string;
  efficiency: string;
};

export const newFilter = (placeId: string): FilterForm => ({
  placeId,
  name: '',
  hours: '',
  days: '',
  pascals: '',
  efficiency: '',
});
export const filterForm = (filter: Filter): FilterForm => ({
  placeId: filter.placeId,
  name: filter.name,
  hours: typedOf(filter.changeAfterHours),
  days: typedOf(filter.changeAfterDays),
  pascals: typedOf(filter.pascalLimit),
  efficiency: typedOf(filter.efficiencyPercent),
});

/** A filter that nothing makes due would be a line without a use, so one of the three is needed. */
export const readFilterForm = (form: FilterForm): FormRead<FilterForm, FilterFields> =>
  readWith(
    z
      .object({
        placeId: z.string().min(1, 'Choose a place.'),
        name: typedName,
        hours: typedMaybe({ min: 0.1, max: 100_000 }),
        days: typedMaybe({ min: 1, max: 3650, whole: true }),
        pascals: typedMaybe({ min: 0.1, max: 100_000 }),
        efficiency: typedMaybe({ min: 0, max: 100 }),
      })
      .refine(({ hours, days, pascals }) => hours !== null || days !== null || pascals !== null, {
        path: ['hours'],
        message: 'Enter hours, days or a pressure: what makes it due.',
      })
      .transform(({ hours, days, pascals, efficiency, ...rest }) => ({
        ...rest,
        changeAfterHours: hours,
        changeAfterDays: days,
        pascalLimit: pascals,
        efficiencyPercent: efficiency,
      })),
    form,
  );

const causes = { hours: 'by hours of spraying', days: 'by the calendar', pressure: 'by its pressure' } as const;

/** `due by hours of spraying`, `due soon by the calendar`, `good`, `no change on record`. */
export function sayStanding({ state, because }: FilterStanding): string {
  const cause = because === null ? '' : ` ${causes[because]}`;
  switch (state) {
    case 'due':
      return `due${cause}`;
    case 'soon':
      return `due soon${cause}`;
    case 'never-changed':
      return 'no change on record';
    case 'good':
      return 'good';
    default:
      return state satisfies never;
  }
}
