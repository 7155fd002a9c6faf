import type { Knex } from 'knex';

/** The air a plan was made with, and why somebody let a stage be sprayed under the dew-point gate. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table draft add column air jsonb;
    alter table posted_plan add column air jsonb;
    -- {rule, reason, by, at, figures}
    alter table stage add column overruled jsonb;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table stage drop column overruled;
    alter table posted_plan drop column air;
    alter table draft drop column air;
  `);
}
