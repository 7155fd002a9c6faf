import type { Place } from '#contracts/places.ts';

export const placeKindTitle: Record<Place['kind'], string> = {
  booth: 'Booths',
  prep: 'Prep stations',
  rack: 'Racks',
};
export const placeKinds = ['booth', 'prep', 'rack'] as const;
