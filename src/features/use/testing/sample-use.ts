import type { PlaceUse, readUse } from '#contracts/use.ts';
import type { ReplyOf } from '#contracts/endpoint.ts';

const none = { setup: 0, work: 0, spray: 0, flash: 0, purge: 0, bake: 0, cool: 0, held: 0 };

export const samplePlace = (n: number, given: Partial<PlaceUse> = {}): PlaceUse => ({
  placeId: `01958000-0005-7000-8000-${String(n).padStart(12, '0')}`,
  name: `Booth ${n}`,
  kind: 'booth',
  hours: none,
  openHours: 50,
  busyOpenHours: 0,
  bookings: 0,
  recorded: 0,
  ...given,
});

/** The week from 9 March 2026, seen on the Thursday. */
export const sampleUse = (given: Partial<ReplyOf<typeof readUse>> = {}): ReplyOf<typeof readUse> => ({
  from: '2026-03-08T23:00:00.000Z',
  to: '2026-03-15T23:00:00.000Z',
  serverTime: '2026-03-12T08:31:20.000Z',
  places: [
    samplePlace(1, {
      hours: { ...none, setup: 4.2, spray: 11.4, flash: 7.1, purge: 1.3, bake: 8.5, cool: 3.9, held: 2.4 },
      busyOpenHours: 35.1,
      bookings: 31,
      recorded: 19,
    }),
    samplePlace(2, {
      hours: { ...none, setup: 2.6, spray: 5.2, flash: 3.8, held: 6.5 },
      openHours: 42,
      busyOpenHours: 11.6,
      bookings: 14,
      recorded: 9,
    }),
    samplePlace(3, {
      name: 'Prep 1',
      kind: 'prep',
      hours: { ...none, work: 33.5, bake: 2.1, cool: 1.2 },
      busyOpenHours: 36.8,
      bookings: 22,
      recorded: 15,
    }),
    samplePlace(4, {
      name: 'Prep 2',
      kind: 'prep',
      hours: { ...none, work: 21.2 },
      busyOpenHours: 21.2,
      bookings: 12,
      recorded: 7,
    }),
    samplePlace(5, {
      name: 'Rack',
      kind: 'rack',
      hours: { ...none, flash: 61.3, held: 9 },
      busyOpenHours: 24.4,
      bookings: 9,
      recorded: 4,
    }),
  ],
  ...given,
});
