import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table job (
      shop_id uuid not null references shop (id),
      id uuid not null,
      number integer not null,
      title text not null check (length(title) between 1 and 160),
      vehicle text not null default '',
      colour_note text not null default '',
      notes text not null default '',
      process_sheet_version_id uuid,
      state text not null default 'open' check (state in ('open', 'done', 'withdrawn')),
      -- nothing of the job starts before the vehicle or the part is there
      release_at timestamptz not null,
      promise_at timestamptz,
      weight integer not null default 1 check (weight between 1 and 9),
      -- high-voltage battery on board: heat limits of the vehicle bind
      electric boolean not null default false,
      heat_limit_celsius numeric(5, 2) check (heat_limit_celsius between 20 and 120),
      heat_limit_minutes integer check (heat_limit_minutes > 0),
      version integer not null default 1,
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      finished_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, number),
      foreign key (shop_id, process_sheet_version_id) references process_sheet_version (shop_id, id)
    );
    create index job_sheet on job (shop_id, process_sheet_version_id);
    create index job_state on job (shop_id, state, promise_at);
    create index job_created_by on job (created_by);

    create table part (
      shop_id uuid not null references shop (id),
      id uuid not null,
      job_id uuid not null,
      name text not null check (length(name) between 1 and 120),
      substrate text not null check (substrate in ('steel', 'aluminium', 'pp-tpo', 'abs', 'composite')),
      units integer not null default 1 check (units between 1 and 100),
      position integer not null default 0,
      primary key (shop_id, id),
      foreign key (shop_id, job_id) references job (shop_id, id)
    );
    create index part_job on part (shop_id, job_id);

    create table stage (
      shop_id uuid not null references shop (id),
      id uuid not null,
      job_id uuid not null,
      position integer not null,
      kind text not null,
      title text not null check (length(title) between 1 and 120),
      -- the ways to do it, with minutes as they were worked out; the shape is contracts/sheets.ts
      ways jsonb not null,
      state text not null default 'waiting' check (state in ('waiting', 'running', 'done')),
      started_at timestamptz,
      finished_at timestamptz,
      version integer not null default 1,
      primary key (shop_id, id),
      -- deferred, so that a stage can be put between two others in one go
      unique (shop_id, job_id, position) deferrable initially deferred,
      foreign key (shop_id, job_id) references job (shop_id, id),
      check ((state = 'waiting') = (started_at is null)),
      check ((state = 'done') = (finished_at is not null)),
      check (finished_at is null or finished_at >= started_at)
    );

    select fence_tenant_table(t::regclass) from unnest(array['job', 'part', 'stage']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table stage, part, job');
}
