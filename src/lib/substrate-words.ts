import type { Substrate } from '#contracts/common.ts';

export const substrateWords: Record<Substrate, string> = {
  steel: 'Steel',
  aluminium: 'Aluminium',
  'pp-tpo': 'Plastic, PP or TPO',
  abs: 'Plastic, ABS',
  composite: 'Composite',
};
