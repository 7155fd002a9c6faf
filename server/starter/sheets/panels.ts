import type { Gap, SheetSeed } from './types.ts';
import {
  clearCure,
  eitherWay,
  handwork,
  polish,
  primerCure,
  refit,
  spraying,
  unlessOption,
  waysWith,
  withOption,
} from './ways.ts';

const wet: Gap = { min: 15, max: 240, settle: 15, source: 'next' };

const newPanelBase = {
  coating: 'base',
  coats: 3,
  minutes: 6,
  flash: 10,
  extra: 'extra-coats',
  family: 'colour',
} as const;

export const newPanel: SheetSeed = {
  key: 'new-panel',
  name: 'New steel panel',
  summary: 'Sealer, base and clear in one go, baked where they were sprayed; or primed, baked and block-sanded first.',
  options: [
    { key: 'wet-on-wet', label: 'Wet on wet, without sanding', on: true },
    { key: 'extra-coats', label: 'Extra coats of base', on: false, most: 2 },
    { key: 'polish', label: 'Polish', on: false },
  ],
  parts: [{ name: 'Panel', substrate: 'steel', units: 2 }],
  stages: [
    handwork('scuff', 'prep', 'Scuff and clean', { minutes: 45 }),
    unlessOption(
      'wet-on-wet',
      spraying('prime', 'Primer surfacer', {
        coating: 'primer',
        setup: 15,
        coats: 2,
        minutes: 7,
        flash: 10,
        family: 'primer',
        places: ['booth', 'prep'],
      }),
    ),
    unlessOption('wet-on-wet', primerCure()),
    unlessOption('wet-on-wet', handwork('block', 'block', 'Block-sand', { minutes: 40 })),
    withOption(
      'wet-on-wet',
      spraying('seal', 'Sealer', {
        coating: 'sealer',
        setup: 15,
        coats: 1,
        minutes: 10,
        flash: 0,
        family: 'primer',
        places: ['booth'],
      }),
    ),
    eitherWay(
      waysWith(
        spraying('base', 'Base colour', {
          ...newPanelBase,
          setup: 5,
          // The set-up lies inside the recoat window of the sealer.
          gap: { min: 15, max: 4315, settle: 15, source: 'next' },
        }),
        { option: 'wet-on-wet' },
      ),
      waysWith(
        spraying('base', 'Base colour', {
          ...newPanelBase,
          setup: 15,
          places: ['booth'],
          gap: { min: 0, max: 1440, settle: 0 },
        }),
        { id: 'after-sanding', label: 'Sprayed after sanding', unlessOption: 'wet-on-wet' },
      ),
    ),
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
  options: [
    { key: 'filler', label: 'Filler after all', on: false },
    { key: 'polish', label: 'Polish', on: true },
  ],
  parts: [{ name: 'Side, complete', substrate: 'steel', units: 4 }],
  stages: [
    withOption('filler', handwork('fill', 'fill', 'Filler, shaped', { minutes: 90 })),
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

const blendClear = { coating: 'clear', setup: 0, coats: 2, flash: 10, family: 'colour', gap: wet } as const;

export const blend: SheetSeed = {
  key: 'blend',
  name: 'Blend into the next panel',
  summary: 'Spot of colour faded out, clear right across both panels.',
  options: [
    { key: 'prime', label: 'Prime the spot', on: true },
    { key: 'melt', label: 'Melt the clear out instead of right across', on: false },
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
    eitherWay(
      waysWith(spraying('clear', 'Clear', { ...blendClear, minutes: 9 }), {
        label: 'Right across',
        unlessOption: 'melt',
      }),
      waysWith(spraying('clear', 'Clear', { ...blendClear, minutes: 6 }), {
        id: 'melted-out',
        label: 'Melted out',
        option: 'melt',
      }),
    ),
    clearCure({ spot: true }),
    withOption('polish', polish(45)),
    refit(30),
  ],
};
