import type { Knex } from 'knex';

/** A logger's trace of a bake, kept with the stage it belongs to, with what it came to when it was judged. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table bake_trace (
      shop_id uuid not null references shop (id),
      id uuid not null,
      stage_id uuid not null,
      file_name text not null check (length(file_name) between 1 and 200),
      -- the file as it came, gzip
      file bytea not null,
      -- how it was read: columns, units
      settings jsonb not null,
      coating_id uuid,
      -- the cure points it was held against: [{celsius, minutes}]
      points jsonb not null,
      -- {cured, doneMinutes, neededMinutes, referenceCelsius, peakCelsius, ...}; contracts/traces.ts
      verdict jsonb not null,
      -- a few hundred points for a small drawing: [[minutes, celsius], ...]
      curve jsonb not null,
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      removed_at timestamptz,
      primary key (shop_id, id),
      foreign key (shop_id, stage_id) references stage (shop_id, id),
      foreign key (shop_id, coating_id) references coating (shop_id, id)
    );
    create index bake_trace_stage on bake_trace (shop_id, stage_id);
    create index bake_trace_coating on bake_trace (shop_id, coating_id);
    create index bake_trace_created_by on bake_trace (created_by);
    select fence_tenant_table('bake_trace');
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table bake_trace');
}
