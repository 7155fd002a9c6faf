import type { Knex } from 'knex';

/** Files that people put in, such as a maker's data sheet or a photo. The bytes lie in the store under shop/SHOP/ID. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table attachment (
      shop_id uuid not null references shop (id),
      id uuid not null,
      kind text not null check (kind ~ '^[a-z-]{1,40}$'),
      -- what it belongs to: the kind says which table
      subject_id uuid not null,
      -- as shown and offered for saving; never a path
      name text not null check (length(name) between 1 and 120),
      bytes bigint not null check (bytes > 0),
      mime text not null check (length(mime) between 3 and 120),
      sha256 bytea not null check (length(sha256) = 32),
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      removed_at timestamptz,
      primary key (shop_id, id)
    );
    create index attachment_subject on attachment (shop_id, kind, subject_id) where removed_at is null;
    create index attachment_created_by on attachment (created_by);
    -- a coating has one data sheet at a time
    create unique index attachment_one_data_sheet on attachment (shop_id, subject_id)
      where kind = 'data-sheet' and removed_at is null;
    select fence_tenant_table('attachment');
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table attachment');
}
