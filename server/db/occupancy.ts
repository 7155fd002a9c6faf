import { v7 as uuid } from 'uuid';
import { rangeOf } from './bookings.ts';
import type { Trx } from './in-shop.ts';

export type Occupancy = {
  bookingId: string;
  loadId: string;
  resource: 'place' | 'lamp' | 'person';
  resourceId: string;
  from: Date;
  to: Date;
};

/** Lets go of everything from `now` on; what was taken until then stays on record. */
export async function releaseFrom(trx: Trx, shopId: string, now: Date): Promise<void> {
  await trx('occupancy').where({ shop_id: shopId }).whereRaw('lower(during) >= ?', [now]).delete();
  await trx('occupancy')
    .where({ shop_id: shopId })
    .whereRaw('upper(during) > ?', [now])
    .update({ during: trx.raw(`tstzrange(lower(during), ?, '[)')`, [now]) });
}

export async function insertOccupancy(trx: Trx, shopId: string, rows: readonly Occupancy[]): Promise<void> {
  const columns = { place: 'place_id', lamp: 'lamp_id', person: 'person_id' } as const;
  await trx.batchInsert(
    'occupancy',
    rows.map((row) => ({
      shop_id: shopId,
      id: uuid(),
      booking_id: row.bookingId,
      load_id: row.loadId,
      place_id: null,
      lamp_id: null,
      person_id: null,
      [columns[row.resource]]: row.resourceId,
      during: rangeOf(trx, row),
    })),
    500,
  );
}
