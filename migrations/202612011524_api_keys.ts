import type { Knex } from 'knex';

/**
 * Keys of loggers and other programs. Only a hash is kept. The key itself names its shop, so the row is found inside the
 * shop's own fence and no door in the fence is needed.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table api_key (
      shop_id uuid not null references shop (id),
      id uuid not null,
      label text not null check (length(label) between 1 and 80),
      -- the last characters, to tell keys apart; worth nothing by themselves
      hint text not null check (length(hint) between 4 and 12),
      token_hash bytea not null,
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      last_used_at timestamptz,
      revoked_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, token_hash)
    );
    create index api_key_created_by on api_key (created_by);
    select fence_tenant_table('api_key');
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table api_key');
}
