import type { ShopSettings } from '#contracts/shop-settings.ts';
import { inShop, type Trx } from '../db/in-shop.ts';
import { familiesOfSheets, readShopRow } from '../db/shop.ts';
import type { Config } from '../config.ts';
import type { Deps } from '../deps.ts';
import { may, type Actor } from '../policies.ts';

export const readShop = (deps: Deps, actor: Actor): Promise<ShopSettings> =>
  inShop(deps.db, actor, (trx) => shopView(trx, deps.config, actor));

export async function shopView(trx: Trx, config: Config, actor: Actor): Promise<ShopSettings> {
  return {
    ...(await readShopRow(trx, actor.shopId)),
    families: await familiesOfSheets(trx, actor.shopId),
    mail: may.setUp(actor) ? mailOf(config) : null,
  };
}

/** Where letters go and as whom; user and password of the address stay where they are. */
const mailOf = ({ MAIL_FROM, SMTP_URL, DEV_MAILBOX_DIR }: Config): ShopSettings['mail'] => ({
  from: MAIL_FROM,
  host: SMTP_URL === undefined ? null : new URL(SMTP_URL).host,
  localMailbox: DEV_MAILBOX_DIR !== undefined,
});
