import type { Knex } from 'knex';

/**
 * Who did what, in order, per shop: the audit trail and what live screens catch up from. Partitioned by month because
 * it only grows; a default partition makes sure that nothing is refused when the months were not made in time.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table change (
      shop_id uuid not null references shop (id),
      at timestamptz not null default now(),
      seq bigint not null,
      account_id uuid references account (id),
      -- what kind of thing changed and which ones: contracts/live.ts
      kind text not null,
      ids uuid[] not null default '{}',
      -- for the audit trail: what it was before and is now
      detail jsonb not null default '{}',
      primary key (shop_id, at, seq)
    ) partition by range (at);
    create table change_other partition of change default;
    create index change_seq on change (shop_id, seq);
    create index change_account on change (account_id);

    -- Makes the partitions of this month and the months ahead; safe to call again.
    create function make_change_partitions(months_ahead integer) returns void
      language plpgsql security definer set search_path = public, pg_temp as $$
    declare
      first date;
    begin
      for i in 0..months_ahead loop
        first := date_trunc('month', now() at time zone 'utc')::date + make_interval(months => i);
        if to_regclass(format('change_%s', to_char(first, 'YYYYMM'))) is null then
          execute format('create table change_%s partition of change for values from (%L) to (%L)',
            to_char(first, 'YYYYMM'), first::text || 'T00:00:00Z', (first + interval '1 month')::date::text || 'T00:00:00Z');
          execute format('alter table change_%s enable row level security', to_char(first, 'YYYYMM'));
          execute format('alter table change_%s force row level security', to_char(first, 'YYYYMM'));
        end if;
      end loop;
    end $$;
    revoke execute on function make_change_partitions(integer) from public;
    grant execute on function make_change_partitions(integer) to ovenbird_app;

    select fence_tenant_table('change');
    revoke update, delete on change from ovenbird_app;
    alter table change_other enable row level security;
    alter table change_other force row level security;
    select make_change_partitions(3);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table change; drop function make_change_partitions(integer)');
}
