import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    -- Background work. Holds ids only, so it needs no fence; the worker enters the shop before it reads content.
    -- A worker keeps the row locked while it works: when it dies the lock goes with it and another takes over.
    create table task (
      id uuid primary key,
      kind text not null,
      -- the same key is never queued twice
      key text not null,
      shop_id uuid references shop (id),
      payload jsonb not null default '{}',
      run_at timestamptz not null default now(),
      attempts integer not null default 0,
      last_error text,
      dead_at timestamptz,
      done_at timestamptz,
      created_at timestamptz not null default now(),
      unique (kind, key)
    );
    create index task_due on task (run_at) where done_at is null and dead_at is null;
    create index task_shop on task (shop_id);
    grant select, insert, update, delete on task to ovenbird_app;

    -- Outbox. A row is written in the transaction that causes the letter.
    create table letter (
      shop_id uuid not null references shop (id),
      id uuid not null,
      kind text not null,
      account_id uuid references account (id),
      to_email text not null,
      -- what it is about and which version of it: one event is never mailed twice
      subject_id uuid not null,
      subject_version integer not null,
      data jsonb not null,
      state text not null default 'queued' check (state in ('queued', 'sent', 'dropped', 'dead')),
      last_error text,
      created_at timestamptz not null default now(),
      sent_at timestamptz,
      primary key (shop_id, id),
      unique (shop_id, kind, subject_id, subject_version, to_email)
    );
    create index letter_account on letter (account_id);
    create index letter_open on letter (shop_id, state, created_at);

    -- An answer that was given once is given again when the same request comes twice.
    create table idempotency (
      shop_id uuid not null references shop (id),
      account_id uuid not null references account (id),
      key text not null check (length(key) between 8 and 120),
      route text not null,
      request_hash bytea not null,
      status integer not null,
      reply jsonb,
      created_at timestamptz not null default now(),
      primary key (shop_id, account_id, key)
    );
    create index idempotency_account on idempotency (account_id);
    create index idempotency_age on idempotency (created_at);

    select fence_tenant_table(t::regclass) from unnest(array['letter', 'idempotency']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table idempotency, letter, task');
}
