import type { Knex } from 'knex';

/** History is never taken back, but for a demo shop, which begins anew. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create function forget_demo_history(demo uuid) returns void
      language plpgsql security definer set search_path = public, pg_temp as $$
    begin
      if not exists (select from shop where id = demo and is_demo and id = current_shop()) then
        raise exception 'shop % is no demo shop at hand', demo;
      end if;
      -- tables that only grow, from which the program itself may not take
      delete from change where shop_id = demo;
      delete from air_reading where shop_id = demo;
    end $$;
    revoke execute on function forget_demo_history(uuid) from public;
    grant execute on function forget_demo_history(uuid) to ovenbird_app;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop function forget_demo_history(uuid)');
}
