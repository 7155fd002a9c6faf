import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table coating (
      shop_id uuid not null references shop (id),
      id uuid not null,
      name text not null check (length(name) between 1 and 120),
      kind text not null,
      -- what the maker's data sheet says; the shape is contracts/coatings.ts
      sheet jsonb not null,
      version integer not null default 1,
      retired_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, name)
    );

    create table process_sheet (
      shop_id uuid not null references shop (id),
      id uuid not null,
      name text not null check (length(name) between 1 and 120),
      version integer not null default 1,
      retired_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, name)
    );

    -- Jobs keep the version they were made with.
    create table process_sheet_version (
      shop_id uuid not null references shop (id),
      id uuid not null,
      process_sheet_id uuid not null,
      version integer not null,
      -- stages, ways, phases, windows; the shape is contracts/sheets.ts
      body jsonb not null,
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      primary key (shop_id, id),
      unique (shop_id, process_sheet_id, version),
      foreign key (shop_id, process_sheet_id) references process_sheet (shop_id, id)
    );
    create index process_sheet_version_by on process_sheet_version (created_by);

    select fence_tenant_table(t::regclass) from unnest(array['coating', 'process_sheet', 'process_sheet_version']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table process_sheet_version, process_sheet, coating');
}
