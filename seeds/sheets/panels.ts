import type { Gap, SheetSeed } from './types.ts';
import { clearCure, handwork, polish, primerCure, refit, spraying, withOption } from './ways.ts';

const wet: Gap = { min: 15, max: 240, settle: 15, source: 'next' };

export const newPanel: SheetSeed = {
  key: 'new-panel',
  name: 'New steel panel, wet on wet',
  summary: 'Sealer, base and clear in one go, baked where they were sprayed.',
  options: [{ key: 'polish', label: 'Polish', on: false }],
  parts: [{ name: 'Panel', substrate: 'steel', units: 2 }],
  stages: [
    handwork('scuff', 'prep', 'Scuff and clean', { minutes: 45 }),
    spraying('seal', 'Sealer', {
      coating: 'sealer',
      setup: 15,
      coats: 1,
      minutes: 10,
      flash: 0,
      family: 'primer',
      places: ['booth'],
    }),
    spraying('base', 'Base colour', {
      coating: 'base',
      setup: 5,
      coats: 3,
      minutes: 6,
      flash: 10,
      family: 'colour',
      gap: { min: 15, max: 4320, settle: 15, source: 'recoat' },
    }),
    spraying('clear', 'Clear', {
      coating: 'clear',
      setup: 0,
      coats: 2,
      minutes: 7,
      flash: 10,
      family: 'colour',
      gap: wet,
    }),
    clearCure(),
    withOption('polish', polish(40)),
    refit(40),
  ],
};

export const fullSide: SheetSeed = {
  key: 'full-side',
  name: 'Full side',
  summary: 'A whole vehicle side from filler to polish.',
  options: [{ key: 'polish', label: 'Polish', on: true }],
  parts: [{ name: 'Side, complete', substrate: 'steel', units: 4 }],
  stages: [
    handwork('prep', 'prep', 'Sand and feather', { minutes: 150 }),
    spraying('prime', 'Primer surfacer', {
      coating: 'primer',
      setup: 15,
      coats: 3,
      minutes: 11,
      flash: 10,
      family: 'primer',
      places: ['booth'],
      gap: { min: 0, max: 1440, settle: 0 },
    }),
    primerCure(2),
    handwork('block', 'block', 'Block-sand', { minutes: 110 }),
    handwork('mask', 'mask', 'Mask', { minutes: 50 }),
    spraying('base', 'Base colour', {
      coating: 'base',
      setup: 15,
      coats: 3,
      minutes: 11,
      flash: 10,
      family: 'colour',
      places: ['booth'],
      gap: { min: 0, max: 1440, settle: 0 },
    }),
    spraying('clear', 'Clear', {
      coating: 'clear',
      setup: 0,
      coats: 2,
      minutes: 13,
      flash: 10,
      family: 'colour',
      gap: wet,
    }),
    clearCure(),
    withOption('polish', polish(75)),
    refit(60),
  ],
};

export const blend: SheetSeed = {
  key: 'blend',
  name: 'Blend into the next panel',
  summary: 'Spot of colour faded out, clear right across both panels.',
  options: [
    { key: 'prime', label: 'Prime the spot', on: true },
    { key: 'polish', label: 'Polish', on: true },
  ],
  parts: [
    { name: 'Repaired panel', substrate: 'steel', units: 2 },
    { name: 'Panel next to it', substrate: 'steel', units: 1 },
  ],
  stages: [
    handwork('feather', 'prep', 'Feather and clean', { minutes: 50 }),
    withOption(
      'prime',
      spraying('prime', 'Primer on the spot', {
        coating: 'primer',
        setup: 10,
        coats: 2,
        minutes: 6,
        flash: 10,
        family: 'primer',
        places: ['prep'],
      }),
    ),
    withOption('prime', primerCure()),
    withOption('prime', handwork('block', 'block', 'Block-sand', { minutes: 30 })),
    spraying('base', 'Base colour, blended', {
      coating: 'base',
      setup: 15,
      coats: 3,
      minutes: 7,
      flash: 10,
      family: 'colour',
      places: ['booth'],
      gap: { min: 0, max: 1440, settle: 0 },
    }),
    spraying('clear', 'Clear, right across', {
      coating: 'clear',
      setup: 0,
      coats: 2,
      minutes: 9,
      flash: 10,
      family: 'colour',
      gap: wet,
    }),
    clearCure({ spot: true }),
    withOption('polish', polish(45)),
    refit(30),
  ],
};
