import * as z from 'zod';
import type { Objective, ShopFields, ShopSettings } from '#contracts/shop-settings.ts';
import { typedNumber } from '../../parts/typed.ts';
import { readWith, type FormRead } from '../../parts/use-typed-form.ts';

export type CleanupForm = { from: string; to: string; minutes: string };
export type ShopForm = {
  name: string;
  timeZone: string;
  temperatureUnit: 'C' | 'F';
  clock: '24' | '12';
  lampMove: string;
  freeze: string;
  trainingBlocks: boolean;
  cleanups: CleanupForm[];
  weights: Record<keyof Objective, string>;
};

export const shopForm = (shop: ShopSettings): ShopForm => ({
  name: shop.name,
  timeZone: shop.timeZone,
  temperatureUnit: shop.temperatureUnit,
  clock: shop.clock,
  lampMove: String(shop.lampMoveMinutes),
  freeze: String(shop.freezeMinutes),
  trainingBlocks: shop.trainingBlocks,
  cleanups: shop.cleanups.map(({ from, to, minutes }) => ({ from, to, minutes: String(minutes) })),
  weights: mapWeights(shop.objective, String),
});

export const objectiveKeys = ['tardiness', 'flow', 'booth', 'moves', 'makespan', 'unplaced'] as const;

const mapWeights = <A, B>(weights: Record<keyof Objective, A>, to: (value: A) => B): Record<keyof Objective, B> =>
  Object.fromEntries(objectiveKeys.map((key) => [key, to(weights[key])])) as Record<keyof Objective, B>;

/**
 * What a plan tries to do, in words. The figures are ours (common practice, to be tried out): a minute late counts 1, and
 * the others are measured by it. Leaving a job out costs more than any delay.
 */
export const presets = [
  {
    key: 'promises',
    title: 'Promises first',
    about: 'Late jobs cost most. People are moved about less than a promise is broken.',
    objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 5, unplaced: 100_000 },
  },
  {
    key: 'calm',
    title: 'A calm day',
    about: 'What is posted stays where it is unless a promise is badly late.',
    objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.01, moves: 45, unplaced: 100_000 },
  },
  {
    key: 'throughput',
    title: 'Through the shop',
    about: 'Cars leave soon and booths stand free, even where nothing was promised.',
    objective: { tardiness: 1, flow: 0.08, makespan: 0.05, booth: 0.1, moves: 2, unplaced: 100_000 },
  },
] as const satisfies readonly { key: string; title: string; about: string; objective: Objective }[];

export const weightWords: Record<keyof Objective, { label: string; hint: string }> = {
  tardiness: { label: 'A minute late', hint: 'times the weight of the job' },
  flow: { label: 'A minute in the shop', hint: 'from arrival to done' },
  booth: { label: 'A minute a booth is held', hint: 'purge and cool-down too' },
  moves: { label: 'A posted stage moved', hint: 'to another time, place or person' },
  makespan: { label: 'A minute until all is done', hint: 'the end of the last job' },
  unplaced: { label: 'A job left out', hint: 'more than any delay, or jobs fall out' },
};

/** The preset whose figures these are; null: figures of one's own. */
export function presetOf(weights: ShopForm['weights']): (typeof presets)[number]['key'] | null {
  const found = presets.find(({ objective }) => objectiveKeys.every((key) => Number(weights[key]) === objective[key]));
  return found?.key ?? null;
}

export const weightsOf = (key: (typeof presets)[number]['key']): ShopForm['weights'] =>
  mapWeights<number, string>((presets.find((preset) => preset.key === key) ?? presets[0]).objective, String);

const weight = typedNumber({ min: 0, max: 1_000_000 });
const schema = z.object({
  name: z.string().trim().min(1, 'Enter a name.').max(120, 'At most 120 characters.'),
  timeZone: z.string().min(1, 'Choose a time zone.'),
  temperatureUnit: z.enum(['C', 'F']),
  clock: z.enum(['24', '12']),
  lampMove: typedNumber({ min: 0, max: 240, whole: true }),
  freeze: typedNumber({ min: 0, max: 1440, whole: true }),
  trainingBlocks: z.boolean(),
  cleanups: z
    .array(
      z.object({
        from: z.string().trim().min(1, 'Name both kinds of work.'),
        to: z.string().trim().min(1, 'Name both kinds of work.'),
        minutes: typedNumber({ min: 1, max: 480, whole: true }),
      }),
    )
    .refine((rows) => new Set(rows.map(({ from, to }) => JSON.stringify([from, to]))).size === rows.length, {
      message: 'The same pair is there twice.',
    }),
  weights: z.object({
    tardiness: weight,
    flow: weight,
    booth: weight,
    moves: weight,
    makespan: weight,
    unplaced: typedNumber({ min: 1, max: 1_000_000 }),
  }),
});

export const readShopForm = (form: ShopForm): FormRead<ShopForm, ShopFields> =>
  readWith(
    schema.transform(({ lampMove, freeze, weights, ...rest }) => ({
      ...rest,
      lampMoveMinutes: lampMove,
      freezeMinutes: freeze,
      objective: weights,
    })),
    form,
  );
