import type { Trx } from './in-shop.ts';

/** Local wall time `YYYY-MM-DDTHH:MM` and an RFC 5545 rule (null: once); `minutes` is a length on the wall clock. */
export type Recurring = { startsLocal: string; rule: string | null; minutes: number };

export type ShopSetUp = {
  id: string;
  name: string;
  timeZone: string;
  lampMoveMinutes: number;
  freezeMinutes: number;
  trainingBlocks: boolean;
  cleanups: { from: string; to: string; minutes: number }[];
  objective: Record<'tardiness' | 'flow' | 'makespan' | 'booth' | 'moves' | 'unplaced', number>;
  changeSeq: number;
  planNumber: number;
};
export type ZoneSetUp = { id: string; name: string };
export type PlaceSetUp = {
  id: string;
  kind: 'booth' | 'prep' | 'rack';
  name: string;
  zoneId: string | null;
  units: number;
  bakes: boolean;
  bakeLimitCelsius: number | null;
  volumeM3: number | null;
  airFlowM3PerHour: number | null;
  clearanceMinutes: number;
  retired: boolean;
};
export type CircuitSetUp = { id: string; name: string; kilowatts: number };
export type LampSetUp = {
  id: string;
  name: string;
  circuitId: string;
  kilowatts: number;
  wave: 'short' | 'medium';
  retired: boolean;
};
export type PersonSetUp = {
  id: string;
  name: string;
  skills: string[];
  /** Local day `YYYY-MM-DD` of the last spray training; null where never trained. */
  sprayTrainedOn: string | null;
  retired: boolean;
};
export type Opening = Recurring & { id: string };
export type ClosureKind = 'holiday' | 'closure' | 'maintenance' | 'breakdown';
export type Closure = Recurring & {
  id: string;
  kind: ClosureKind;
  label: string;
  /** Neither place nor lamp: the whole shop. */
  placeId: string | null;
  lampId: string | null;
};
export type Shift = Recurring & { id: string; personId: string; breaks: { after: number; minutes: number }[] };
/** `to` null: until further notice. */
export type Absence = { id: string; personId: string; from: Date; to: Date | null; reason: string };

/** A shop's set-up, retired resources included: what happened before still names them. */
export type Resources = {
  shop: ShopSetUp;
  zones: ZoneSetUp[];
  places: PlaceSetUp[];
  circuits: CircuitSetUp[];
  lamps: LampSetUp[];
  people: PersonSetUp[];
  openings: Opening[];
  closures: Closure[];
  shifts: Shift[];
  absences: Absence[];
};

type AbsenceJson = Omit<Absence, 'from' | 'to'> & { from: string; to: string | null };
type Row = Omit<Resources, 'absences'> & { absences: AbsenceJson[] };

/** All of it in one statement, whatever the shop's size. Lists are in the order in which they are shown. */
export async function loadResources(trx: Trx, shopId: string): Promise<Resources> {
  const answer = await trx.raw<{ rows: Row[] }>(SET_UP, { shopId });
  const row = answer.rows[0];
  if (!row?.shop) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return {
    ...row,
    absences: row.absences.map((a) => ({ ...a, from: new Date(a.from), to: a.to === null ? null : new Date(a.to) })),
  };
}

const SET_UP = `
  select
    (select json_build_object('id', id, 'name', name, 'timeZone', time_zone, 'lampMoveMinutes', lamp_move_minutes,
        'freezeMinutes', freeze_minutes, 'trainingBlocks', training_blocks, 'cleanups', cleanups,
        'objective', objective, 'changeSeq', change_seq, 'planNumber', plan_number)
      from shop where id = :shopId) as shop,
    (select coalesce(json_agg(json_build_object('id', id, 'name', name) order by name), '[]')
      from zone where shop_id = :shopId and retired_at is null) as zones,
    (select coalesce(json_agg(json_build_object('id', id, 'kind', kind, 'name', name, 'zoneId', zone_id,
        'units', units, 'bakes', bakes, 'bakeLimitCelsius', bake_limit_celsius, 'volumeM3', volume_m3,
        'airFlowM3PerHour', air_flow_m3_per_hour, 'clearanceMinutes', clearance_minutes,
        'retired', retired_at is not null) order by position, name), '[]')
      from place where shop_id = :shopId) as places,
    (select coalesce(json_agg(json_build_object('id', id, 'name', name, 'kilowatts', kilowatts) order by name), '[]')
      from circuit where shop_id = :shopId) as circuits,
    (select coalesce(json_agg(json_build_object('id', id, 'name', name, 'circuitId', circuit_id,
        'kilowatts', kilowatts, 'wave', wave, 'retired', retired_at is not null) order by position, name), '[]')
      from lamp where shop_id = :shopId) as lamps,
    (select coalesce(json_agg(json_build_object('id', id, 'name', name, 'skills', skills,
        'sprayTrainedOn', spray_trained_on, 'retired', retired_at is not null) order by position, name), '[]')
      from person where shop_id = :shopId) as people,
    (select coalesce(json_agg(json_build_object('id', id, 'startsLocal', starts_local, 'rule', rule,
        'minutes', minutes) order by starts_local, id), '[]')
      from opening where shop_id = :shopId) as openings,
    (select coalesce(json_agg(json_build_object('id', id, 'kind', kind, 'label', label, 'placeId', place_id,
        'lampId', lamp_id, 'startsLocal', starts_local, 'rule', rule, 'minutes', minutes)
        order by starts_local, id), '[]')
      from closure where shop_id = :shopId) as closures,
    (select coalesce(json_agg(json_build_object('id', id, 'personId', person_id, 'startsLocal', starts_local,
        'rule', rule, 'minutes', minutes, 'breaks', breaks) order by starts_local, id), '[]')
      from shift where shop_id = :shopId) as shifts,
    (select coalesce(json_agg(json_build_object('id', id, 'personId', person_id, 'from', lower(during),
        'to', upper(during), 'reason', reason) order by during, id), '[]')
      from absence where shop_id = :shopId) as absences`;
