import type { Knex } from 'knex';

/** People who sign in, their sessions and one-time links. Not fenced by shop: one account may belong to several. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table account (
      id uuid primary key,
      email citext not null unique check (length(email::text) between 3 and 254),
      name text not null check (length(name) between 1 and 120),
      password_hash text,
      temperature_unit text not null default 'C' check (temperature_unit in ('C', 'F')),
      clock text not null default '24' check (clock in ('24', '12')),
      disabled_at timestamptz,
      created_at timestamptz not null default now()
    );

    -- The shape connect-pg-simple reads and writes; account_id lets all sessions of one account be ended.
    create table session (
      sid text primary key,
      sess jsonb not null,
      expire timestamptz not null,
      account_id uuid generated always as ((sess #>> '{passport,user}')::uuid) stored
    );
    create index session_expire on session (expire);
    create index session_account on session (account_id);

    -- Password resets and invitations. Only a hash is kept; a token is good once and not for long.
    create table account_token (
      id uuid primary key,
      kind text not null check (kind in ('reset', 'invitation')),
      email citext not null,
      account_id uuid references account (id) on delete cascade,
      shop_id uuid,
      role text check (role in ('owner', 'lead', 'painter', 'office')),
      person_id uuid,
      token_hash bytea unique,
      expires_at timestamptz not null,
      used_at timestamptz,
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      check ((kind = 'invitation') = (shop_id is not null and role is not null)),
      check ((kind = 'reset') = (account_id is not null))
    );
    create index account_token_account on account_token (account_id);
    create index account_token_created_by on account_token (created_by);
    create index account_token_shop on account_token (shop_id);

    -- The table rate-limiter-flexible reads and writes.
    create table rate_limit (
      key varchar(255) primary key,
      points integer not null default 0,
      expire bigint
    );

    grant select, insert, update, delete on account, session, account_token, rate_limit to ovenbird_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table rate_limit, account_token, session, account');
}
