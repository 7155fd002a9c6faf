import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table shop (
      id uuid primary key,
      name text not null check (length(name) between 1 and 120),
      time_zone text not null,
      lamp_move_minutes integer not null default 5 check (lamp_move_minutes between 0 and 240),
      -- a posted booking that starts within this many minutes is left alone by a re-plan
      freeze_minutes integer not null default 60 check (freeze_minutes between 0 and 1440),
      -- spraying needs training of the last five years; false turns the block into a warning
      training_blocks boolean not null default true,
      cleanups jsonb not null default '[]',
      objective jsonb not null,
      -- counts everything that happened in the shop; its row lock keeps writers of one shop in order
      change_seq bigint not null default 0,
      plan_number integer not null default 0,
      job_number integer not null default 0,
      is_demo boolean not null default false,
      created_at timestamptz not null default now()
    );
    alter table account_token add foreign key (shop_id) references shop (id);

    create table membership (
      shop_id uuid not null references shop (id),
      id uuid not null,
      account_id uuid not null references account (id),
      role text not null check (role in ('owner', 'lead', 'painter', 'office')),
      person_id uuid,
      disabled_at timestamptz,
      created_at timestamptz not null default now(),
      primary key (shop_id, id),
      unique (shop_id, account_id)
    );
    create index membership_account on membership (account_id);

    alter table shop enable row level security;
    alter table shop force row level security;
    create policy own_shop on shop using (
      id = current_shop()
      or exists (select 1 from membership m where m.shop_id = shop.id and m.account_id = current_account())
    ) with check (id = current_shop());
    grant select, insert, update, delete on shop to ovenbird_app;

    -- A person sees the own memberships of every shop (to choose one), and all of the shop at hand.
    alter table membership enable row level security;
    alter table membership force row level security;
    create policy own_shop on membership
      using (shop_id = current_shop() or account_id = current_account())
      with check (shop_id = current_shop());
    grant select, insert, update, delete on membership to ovenbird_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(
    'drop table membership; alter table account_token drop constraint account_token_shop_id_fkey; drop table shop',
  );
}
