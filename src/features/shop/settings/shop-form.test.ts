import { describe, expect, it } from 'vitest';
import { shopFields, type ShopSettings } from '#contracts/shop-settings.ts';
import { presetOf, presets, readShopForm, shopForm, weightsOf } from './model/shop-form.ts';

const settings: ShopSettings = {
  version: 1,
  name: 'Saltmarsh Coachworks',
  timeZone: 'Europe/Berlin',
  temperatureUnit: 'C',
  clock: '24',
  lampMoveMinutes: 5,
  freezeMinutes: 60,
  trainingBlocks: true,
  cleanups: [{ from: 'primer', to: 'colour', minutes: 15 }],
  objective: { tardiness: 1, flow: 0.01, makespan: 0, booth: 0.02, moves: 5, unplaced: 100_000 },
  families: ['colour', 'primer'],
  mail: null,
};

describe('settings as typed', () => {
  it('come back as they were', () => {
    const { version: _version, families: _families, mail: _mail, ...fields } = settings;
    expect(readShopForm(shopForm(settings)).value).toEqual(fields);
  });
  it('say which field is wrong', () => {
    const form = shopForm(settings);
    const row = { from: 'primer', to: 'colour', minutes: '5' };
    expect(
      readShopForm({
        ...form,
        name: ' ',
        freeze: '-1',
        cleanups: [row, row],
        weights: { ...form.weights, unplaced: '0' },
      }).faults,
    ).toEqual({
      name: 'Enter a name.',
      freeze: 'Enter a whole number from 0 to 1440.',
      cleanups: 'The same pair is there twice.',
      weights: 'Enter a number from 1 to 1000000.',
    });
  });
});

describe('what a plan tries to do', () => {
  it.each(presets.map(({ key }) => key))('%s is told from its figures, and can be kept', (key) => {
    const form = { ...shopForm(settings), weights: weightsOf(key) };
    expect(presetOf(form.weights)).toBe(key);
    expect(shopFields.safeParse(readShopForm(form).value).success).toBe(true);
  });
  it('with other figures is none of the three', () => {
    expect(presetOf({ ...weightsOf('calm'), moves: '7' })).toBeNull();
  });
});
