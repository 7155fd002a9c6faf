import type { Knex } from 'knex';

/**
 * Extensions and the role the program runs as. The role owns nothing and cannot pass row level security; the owner
 * of the tables only migrates. Where the connecting user may not create roles, an administrator makes it beforehand.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create extension if not exists btree_gist;
    create extension if not exists citext;

    do $$ begin
      if not exists (select 1 from pg_roles where rolname = 'ovenbird_app') then
        create role ovenbird_app nologin nosuperuser nobypassrls nocreatedb nocreaterole;
      end if;
    exception when duplicate_object or unique_violation then null; -- another database of this cluster was quicker
    end $$;
    do $$ begin
      execute format('grant ovenbird_app to %I', current_user);
    exception when unique_violation or duplicate_object then null;
    end $$;
    grant usage on schema public to ovenbird_app;

    -- The shop and the account a transaction acts for. After a transaction the setting reads '' and not null.
    create function current_shop() returns uuid language sql stable parallel safe
      as $$ select nullif(current_setting('app.shop_id', true), '')::uuid $$;
    create function current_account() returns uuid language sql stable parallel safe
      as $$ select nullif(current_setting('app.account_id', true), '')::uuid $$;

    -- Every tenant table gets the same fence, so that a forgotten WHERE shows nothing.
    create function fence_tenant_table(name regclass) returns void language plpgsql as $$
    begin
      execute format('alter table %s enable row level security', name);
      execute format('alter table %s force row level security', name);
      execute format('create policy own_shop on %s using (shop_id = current_shop()) with check (shop_id = current_shop())', name);
      execute format('grant select, insert, update, delete on %s to ovenbird_app', name);
    end $$;
    revoke execute on function fence_tenant_table(regclass) from public;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop function fence_tenant_table(regclass);
    drop function current_account();
    drop function current_shop();
    revoke usage on schema public from ovenbird_app;
  `);
}
