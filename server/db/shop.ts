import type { ShopFields } from '#contracts/shop-settings.ts';
import type { Trx } from './in-shop.ts';

export type ShopRow = ShopFields & { version: number };

const columns = {
  name: 'name',
  timeZone: 'time_zone',
  temperatureUnit: 'temperature_unit',
  clock: 'clock',
  lampMoveMinutes: 'lamp_move_minutes',
  freezeMinutes: 'freeze_minutes',
  trainingBlocks: 'training_blocks',
  cleanups: 'cleanups',
  objective: 'objective',
} as const satisfies Record<keyof ShopFields, string>;

const mustBe = (row: ShopRow | undefined, shopId: string): ShopRow => {
  if (!row) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return row;
};

export async function readShopRow(trx: Trx, shopId: string): Promise<ShopRow> {
  const row = await trx('shop')
    .where({ id: shopId })
    .first<ShopRow | undefined>({ version: 'version', ...columns });
  return mustBe(row, shopId);
}

/** Takes the shop's row until the transaction ends. */
export async function lockShopRow(trx: Trx, shopId: string): Promise<ShopRow> {
  const row = await trx('shop')
    .where({ id: shopId })
    .forNoKeyUpdate()
    .first<ShopRow | undefined>({ version: 'version', ...columns });
  return mustBe(row, shopId);
}

/** Fields that are given; counts the version up. */
export async function updateShop(trx: Trx, shopId: string, fields: Partial<ShopFields>): Promise<void> {
  const json = (value: unknown) => (typeof value === 'object' ? JSON.stringify(value) : value);
  await trx('shop')
    .where({ id: shopId })
    .update({
      ...Object.fromEntries(
        Object.entries(fields).map(([field, value]) => [columns[field as keyof ShopFields], json(value)]),
      ),
      version: trx.raw('version + 1'),
    });
}

/** Families that ways of process sheets name: what a clean-up stands between. */
export async function familiesOfSheets(trx: Trx, shopId: string): Promise<string[]> {
  const { rows } = await trx.raw<{ rows: { family: string }[] }>(
    `select distinct w ->> 'family' as family
     from process_sheet_version v
     join process_sheet p on p.shop_id = v.shop_id and p.id = v.process_sheet_id and p.retired_at is null
     cross join lateral jsonb_array_elements(v.body -> 'stages') s
     cross join lateral jsonb_array_elements(s -> 'ways') w
     where v.shop_id = ? and w ->> 'family' is not null order by 1`,
    [shopId],
  );
  return rows.map(({ family }) => family);
}

/** A new account begins with the shop's units and clock. */
export async function giveShopUnits(trx: Trx, shopId: string, accountId: string): Promise<void> {
  await trx.raw(
    `update account set temperature_unit = shop.temperature_unit, clock = shop.clock
     from shop where shop.id = ? and account.id = ?`,
    [shopId, accountId],
  );
}
