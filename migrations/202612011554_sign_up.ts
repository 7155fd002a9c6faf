import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    alter table account_token drop constraint account_token_kind_check;
    -- sign-up: an address that wants to open a shop; the link in the letter proves that it is theirs
    alter table account_token add constraint account_token_kind_check
      check (kind in ('reset', 'invitation', 'sign-up'));
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    delete from account_token where kind = 'sign-up';
    alter table account_token drop constraint account_token_kind_check;
    alter table account_token add constraint account_token_kind_check check (kind in ('reset', 'invitation'));
  `);
}
