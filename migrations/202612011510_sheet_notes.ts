import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    -- counts every change of a sheet, renaming and retiring too; \`version\` counts only what jobs are made from
    alter table process_sheet add column revision integer not null default 1;
    -- what changed, in the words of whoever saved it
    alter table process_sheet_version add column note text not null default '' check (length(note) <= 400);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table process_sheet_version drop column note;
    alter table process_sheet drop column revision;
  `);
}
