import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    -- The one draft a shop works on. Several leads may edit it: every change names the version it has seen.
    create table draft (
      shop_id uuid not null references shop (id),
      id uuid not null,
      state text not null default 'open' check (state in ('open', 'posted', 'dropped')),
      -- the posted plan it grew from
      plan_number integer not null,
      version integer not null default 1,
      cost double precision,
      bound double precision,
      -- [{jobId, stageId, reason}]
      unplaced jsonb not null default '[]',
      created_by uuid references account (id),
      created_at timestamptz not null default now(),
      updated_by uuid references account (id),
      updated_at timestamptz not null default now(),
      primary key (shop_id, id)
    );
    create unique index draft_open on draft (shop_id) where state = 'open';
    create index draft_created_by on draft (created_by);
    create index draft_updated_by on draft (updated_by);

    create table draft_item (
      shop_id uuid not null references shop (id),
      id uuid not null,
      draft_id uuid not null,
      stage_id uuid not null,
      way text not null,
      place_id uuid not null,
      person_id uuid,
      lamp_ids uuid[] not null default '{}',
      load_id uuid not null,
      during tstzrange not null check (lower_inc(during) and not upper_inc(during)),
      -- [[from, to], ...] in whole minutes from the start of during
      phases jsonb not null,
      pinned boolean not null default false,
      primary key (shop_id, id),
      unique (shop_id, draft_id, stage_id),
      foreign key (shop_id, draft_id) references draft (shop_id, id) on delete cascade,
      foreign key (shop_id, stage_id) references stage (shop_id, id) on delete cascade,
      foreign key (shop_id, place_id) references place (shop_id, id),
      foreign key (shop_id, person_id) references person (shop_id, id)
    );
    create index draft_item_stage on draft_item (shop_id, stage_id);
    create index draft_item_place on draft_item (shop_id, place_id);
    create index draft_item_person on draft_item (shop_id, person_id);

    -- Every posted plan, whole, so that any earlier one can be looked at.
    create table posted_plan (
      shop_id uuid not null references shop (id),
      id uuid not null,
      number integer not null,
      posted_by uuid references account (id),
      posted_at timestamptz not null default now(),
      cost double precision,
      -- bookings as they were posted
      body jsonb not null,
      primary key (shop_id, id),
      unique (shop_id, number)
    );
    create index posted_plan_by on posted_plan (posted_by);

    -- What everyone works by. One live booking a stage.
    create table booking (
      shop_id uuid not null references shop (id),
      id uuid not null,
      stage_id uuid not null,
      plan_number integer not null,
      way text not null,
      place_id uuid not null,
      person_id uuid,
      lamp_ids uuid[] not null default '{}',
      load_id uuid not null,
      during tstzrange not null check (lower_inc(during) and not upper_inc(during)),
      -- [[from, to], ...] in whole minutes from the start of during
      phases jsonb not null,
      pinned boolean not null default false,
      state text not null default 'planned' check (state in ('planned', 'running', 'done', 'cancelled')),
      version integer not null default 1,
      primary key (shop_id, id),
      foreign key (shop_id, stage_id) references stage (shop_id, id),
      foreign key (shop_id, place_id) references place (shop_id, id),
      foreign key (shop_id, person_id) references person (shop_id, id)
    );
    create unique index booking_live on booking (shop_id, stage_id) where state <> 'cancelled';
    create index booking_place on booking (shop_id, place_id);
    create index booking_person on booking (shop_id, person_id);
    create index booking_during on booking using gist (shop_id, during) where state <> 'cancelled';

    -- Time in which a booking has a place, a lamp or a pair of hands to itself. Members of one load share.
    -- Writers lock the resource's row first; the constraint is the last line. Racks are counted, not excluded.
    create table occupancy (
      shop_id uuid not null references shop (id),
      id uuid not null,
      booking_id uuid not null,
      load_id uuid not null,
      place_id uuid,
      lamp_id uuid,
      person_id uuid,
      resource_id uuid not null generated always as (coalesce(place_id, lamp_id, person_id)) stored,
      during tstzrange not null check (not isempty(during) and lower_inc(during) and not upper_inc(during)),
      primary key (shop_id, id),
      check (num_nonnulls(place_id, lamp_id, person_id) = 1),
      foreign key (shop_id, booking_id) references booking (shop_id, id) on delete cascade,
      foreign key (shop_id, place_id) references place (shop_id, id),
      foreign key (shop_id, lamp_id) references lamp (shop_id, id),
      foreign key (shop_id, person_id) references person (shop_id, id),
      constraint occupancy_one_at_a_time
        exclude using gist (shop_id with =, resource_id with =, load_id with <>, during with &&)
    );
    create index occupancy_booking on occupancy (shop_id, booking_id);
    create index occupancy_place on occupancy (shop_id, place_id);
    create index occupancy_lamp on occupancy (shop_id, lamp_id);
    create index occupancy_person on occupancy (shop_id, person_id);

    create table plan_run (
      shop_id uuid not null references shop (id),
      id uuid not null,
      state text not null default 'queued' check (state in ('queued', 'running', 'done', 'stopped', 'failed')),
      -- 'all': everything not fixed; 'rest': only what has no booking yet
      scope text not null check (scope in ('all', 'rest')),
      seed integer not null,
      seconds integer not null check (seconds between 1 and 300),
      stop_requested boolean not null default false,
      -- {cost, bound, evaluations, unplaced}
      progress jsonb,
      failure text,
      draft_id uuid,
      requested_by uuid references account (id),
      created_at timestamptz not null default now(),
      started_at timestamptz,
      finished_at timestamptz,
      primary key (shop_id, id),
      foreign key (shop_id, draft_id) references draft (shop_id, id)
    );
    create unique index plan_run_one_at_a_time on plan_run (shop_id) where state in ('queued', 'running');
    create index plan_run_draft on plan_run (shop_id, draft_id);
    create index plan_run_by on plan_run (requested_by);

    select fence_tenant_table(t::regclass)
      from unnest(array['draft', 'draft_item', 'posted_plan', 'booking', 'occupancy', 'plan_run']) t;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw('drop table plan_run, occupancy, booking, posted_plan, draft_item, draft');
}
