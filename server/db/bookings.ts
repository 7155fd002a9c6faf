import type { Trx } from './in-shop.ts';

/** Where and when a stage is done, in the posted plan or in a draft. */
export type Booked = {
  stageId: string;
  way: string;
  placeId: string;
  personId: string | null;
  lampIds: string[];
  /** Stages with the same one run together. */
  loadId: string;
  from: Date;
  to: Date;
  /** `[from, to]` in whole minutes from the start, one for each phase of the way. */
  phases: [from: number, to: number][];
  pinned: boolean;
};
export type Booking = Booked & {
  id: string;
  planNumber: number;
  state: 'planned' | 'running' | 'done';
  version: number;
};

/** Columns of a booking or a draft's item, named as in `Booked`. */
export const bookedColumns = {
  stageId: 'stage_id',
  way: 'way',
  placeId: 'place_id',
  personId: 'person_id',
  lampIds: 'lamp_ids',
  loadId: 'load_id',
  phases: 'phases',
  pinned: 'pinned',
} as const;

export const bookedRow = (booked: Booked) => ({
  stage_id: booked.stageId,
  way: booked.way,
  place_id: booked.placeId,
  person_id: booked.personId,
  lamp_ids: booked.lampIds,
  load_id: booked.loadId,
  phases: JSON.stringify(booked.phases),
  pinned: booked.pinned,
});

/** Half-open, as all ranges of the program. */
export const rangeOf = (trx: Trx, span: { from: Date; to: Date }) =>
  trx.raw<string>(`tstzrange(?, ?, '[)')`, [span.from, span.to]);

/** Live bookings of jobs that are neither done nor withdrawn. */
export async function loadOpenBookings(trx: Trx, shopId: string): Promise<Booking[]> {
  return trx('booking')
    .join('stage', (on) => on.on('stage.shop_id', 'booking.shop_id').on('stage.id', 'booking.stage_id'))
    .join('job', (on) => on.on('job.shop_id', 'stage.shop_id').on('job.id', 'stage.job_id'))
    .where({ 'booking.shop_id': shopId, 'job.state': 'open' })
    .whereNot('booking.state', 'cancelled')
    .orderByRaw('lower(booking.during), booking.id')
    .select({
      id: 'booking.id',
      planNumber: 'booking.plan_number',
      state: 'booking.state',
      version: 'booking.version',
      stageId: 'booking.stage_id',
      way: 'booking.way',
      placeId: 'booking.place_id',
      personId: 'booking.person_id',
      lampIds: 'booking.lamp_ids',
      loadId: 'booking.load_id',
      phases: 'booking.phases',
      pinned: 'booking.pinned',
      from: trx.raw('lower(booking.during)'),
      to: trx.raw('upper(booking.during)'),
    });
}

export async function insertBookings(
  trx: Trx,
  shopId: string,
  planNumber: number,
  bookings: readonly (Booked & { id: string })[],
): Promise<void> {
  const rows = bookings.map((b) => ({
    shop_id: shopId,
    id: b.id,
    plan_number: planNumber,
    ...bookedRow(b),
    during: rangeOf(trx, b),
  }));
  await trx.batchInsert('booking', rows, 500);
}

/** Gives a planned booking another time, place or person. One that has begun meanwhile is left alone: false. */
export async function replaceBooking(
  trx: Trx,
  shopId: string,
  planNumber: number,
  booking: Booked & { id: string },
): Promise<boolean> {
  const { stage_id: _, ...row } = bookedRow(booking);
  const count = await trx('booking')
    .where({ shop_id: shopId, id: booking.id, state: 'planned' })
    .update({ ...row, during: rangeOf(trx, booking), plan_number: planNumber, version: trx.raw('version + 1') });
  return count === 1;
}

export async function cancelBookings(trx: Trx, shopId: string, ids: readonly string[]): Promise<void> {
  if (ids.length === 0) return;
  await trx('occupancy').where({ shop_id: shopId }).whereIn('booking_id', ids).delete();
  await trx('booking')
    .where({ shop_id: shopId, state: 'planned' })
    .whereIn('id', ids)
    .update({ state: 'cancelled', version: trx.raw('version + 1') });
}
