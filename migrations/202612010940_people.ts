import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table person (
      shop_id uuid not null references shop (id),
      id uuid not null,
      name text not null check (length(name) between 1 and 120),
      skills text[] not null default '{}',
      -- 40 CFR 63.11173(e): spray training, good for five years; null where never trained
      spray_trained_on date,
      position integer not null default 0,
      retired_at timestamptz,
      primary key (shop_id, id)
    );
    alter table membership add foreign key (shop_id, person_id) references person (shop_id, id);
    create index membership_person on membership (shop_id, person_id);

    create table shift (
      shop_id uuid not null references shop (id),
      id uuid not null,
      person_id uuid not null,
      starts_local text not null check (starts_local ~ '^\\d{4}-\\d\\d-\\d\\dT\\d\\d:\\d\\d$'),
      rule text,
      minutes integer not null check (minutes between 1 and 1440),
      -- [{after, minutes}]: breaks, counted from the start of the shift
      breaks jsonb not null default '[]',
      primary key (shop_id, id),
      foreign key (shop_id, person_id) references person (shop_id, id)
    );
    create index shift_person on shift (shop_id, person_id);

    create table absence (
      shop_id uuid not null references shop (id),
      id uuid not null,
      person_id uuid not null,
      during tstzrange not null check (not isempty(during) and lower_inc(during) and not upper_inc(during)),
      reason text not null default '',
      primary key (shop_id, id),
      foreign key (shop_id, person_id) references person (shop_id, id)
    );
    create index absence_person on absence (shop_id, person_id);

    select fence_tenant_table(t::regclass) from unnest(array['person', 'shift', 'absence']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table membership drop constraint membership_shop_id_person_id_fkey;
    drop table absence, shift, person;
  `);
}
