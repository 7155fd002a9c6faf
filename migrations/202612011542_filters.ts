import type { Knex } from 'knex';

/** Filters of booths and stations: when they are due, when they were changed, and what the gauge said. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table filter (
      shop_id uuid not null references shop (id),
      id uuid not null,
      place_id uuid not null,
      name text not null check (length(name) between 1 and 80),
      -- due after so many hours of spraying in the place, or after so many days, whichever comes first
      change_after_hours numeric(7, 1) check (change_after_hours > 0),
      change_after_days integer check (change_after_days between 1 and 3650),
      -- pressure drop at which it is changed whatever else
      pascal_limit numeric(7, 1) check (pascal_limit > 0),
      efficiency_percent numeric(5, 2) check (efficiency_percent between 0 and 100),
      version integer not null default 1,
      retired_at timestamptz,
      created_at timestamptz not null default now(),
      primary key (shop_id, id),
      unique (shop_id, place_id, name),
      foreign key (shop_id, place_id) references place (shop_id, id)
    );

    create table filter_entry (
      shop_id uuid not null references shop (id),
      id uuid not null,
      filter_id uuid not null,
      kind text not null check (kind in ('change', 'pressure')),
      at timestamptz not null,
      pascals numeric(7, 1) check (pascals >= 0),
      note text not null default '' check (length(note) <= 400),
      account_id uuid references account (id),
      created_at timestamptz not null default now(),
      primary key (shop_id, id),
      foreign key (shop_id, filter_id) references filter (shop_id, id),
      check (kind <> 'pressure' or pascals is not null)
    );
    create index filter_entry_filter on filter_entry (shop_id, filter_id, at desc);
    create index filter_entry_account on filter_entry (account_id);

    select fence_tenant_table(t::regclass) from unnest(array['filter', 'filter_entry']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table filter_entry, filter');
}
