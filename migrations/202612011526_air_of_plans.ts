import type { Knex } from 'knex';

/**
 * The air a plan was made with; which coating a stage puts on, so that its flash can follow the air; and why somebody let
 * a stage be sprayed under the dew-point gate. Stages that are there already learn their coating from their process sheet.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table draft add column air jsonb;
    alter table posted_plan add column air jsonb;
    alter table stage add column coating_id uuid;
    -- {rule, reason, by, at, figures}
    alter table stage add column overruled jsonb;

    -- The fence holds the owner too; for this one statement it is lifted, inside the transaction of the migration.
    alter table stage no force row level security;
    alter table job no force row level security;
    alter table process_sheet_version no force row level security;
    alter table coating no force row level security;
    update stage s set coating_id = c.id
      from job j
      join process_sheet_version v on v.shop_id = j.shop_id and v.id = j.process_sheet_version_id
      cross join lateral jsonb_array_elements(v.body -> 'stages') as sheet_stage
      join coating c on c.shop_id = v.shop_id and c.id::text = sheet_stage ->> 'coatingId'
      where s.shop_id = j.shop_id and s.job_id = j.id
        and sheet_stage ->> 'kind' = s.kind and sheet_stage ->> 'title' = s.title;
    alter table stage force row level security;
    alter table job force row level security;
    alter table process_sheet_version force row level security;
    alter table coating force row level security;

    alter table stage add constraint stage_coating_fkey foreign key (shop_id, coating_id) references coating (shop_id, id);
    create index stage_coating on stage (shop_id, coating_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table stage drop column overruled, drop column coating_id;
    alter table posted_plan drop column air;
    alter table draft drop column air;
  `);
}
