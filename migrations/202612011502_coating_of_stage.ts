import type { Knex } from 'knex';

/** Which coating a job's stage puts on or cures, so that a changed data sheet finds the stages it speaks of. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table stage add column coating_id uuid;
    alter table stage add foreign key (shop_id, coating_id) references coating (shop_id, id);
    create index stage_coating on stage (shop_id, coating_id);

    -- Stages made before: by the sheet their job was made from. The owner of the tables looks past the fence for it.
    alter table stage no force row level security;
    alter table job no force row level security;
    alter table process_sheet_version no force row level security;
    update stage set coating_id = made.coating_id
    from (
      select distinct on (s.shop_id, s.id) s.shop_id, s.id, (from_sheet ->> 'coatingId')::uuid as coating_id
      from stage s
      join job j on j.shop_id = s.shop_id and j.id = s.job_id
      join process_sheet_version v on v.shop_id = j.shop_id and v.id = j.process_sheet_version_id
      cross join lateral jsonb_array_elements(v.body -> 'stages') from_sheet
      where from_sheet ->> 'kind' = s.kind and from_sheet ->> 'title' = s.title and from_sheet ->> 'coatingId' is not null
      order by s.shop_id, s.id
    ) made
    where stage.shop_id = made.shop_id and stage.id = made.id;
    alter table stage force row level security;
    alter table job force row level security;
    alter table process_sheet_version force row level security;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('alter table stage drop column coating_id');
}
