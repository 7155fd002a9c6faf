import { v7 as uuid } from 'uuid';
import type { Shift } from '#contracts/people.ts';
import type { Trx } from './in-shop.ts';

export type PersonRow = {
  id: string;
  version: number;
  name: string;
  skills: string[];
  /** Local day of the last spray training. */
  sprayTrainedOn: string | null;
  leavesOn: string | null;
  retired: boolean;
  member: { id: string; name: string } | null;
  shifts: Shift[];
  absences: { id: string; from: string; to: string | null; reason: string }[];
};

const PEOPLE = `
  select p.id, p.version, p.name, p.skills, p.spray_trained_on::text as "sprayTrainedOn",
    p.leaves_on::text as "leavesOn", p.retired_at is not null as retired,
    (select json_build_object('id', m.id, 'name', a.name) from membership m join account a on a.id = m.account_id
      where m.shop_id = p.shop_id and m.person_id = p.id order by m.created_at limit 1) as member,
    (select coalesce(json_agg(json_build_object('startsLocal', s.starts_local, 'rule', s.rule, 'minutes', s.minutes,
        'breaks', s.breaks) order by s.starts_local, s.id), '[]')
      from shift s where s.shop_id = p.shop_id and s.person_id = p.id) as shifts,
    (select coalesce(json_agg(json_build_object('id', b.id, 'from', lower(b.during), 'to', upper(b.during),
        'reason', b.reason) order by b.during, b.id), '[]')
      from absence b where b.shop_id = p.shop_id and b.person_id = p.id) as absences
  from person p where p.shop_id = :shopId and (:id::uuid is null or p.id = :id::uuid)
  order by p.retired_at is not null, p.position, p.name`;

/** Everybody of the roster with hours, absences and account: who works here first, in the shop's own order. */
export async function loadPeople(trx: Trx, shopId: string): Promise<PersonRow[]> {
  const { rows } = await trx.raw<{ rows: PersonRow[] }>(PEOPLE, { shopId, id: null });
  return rows;
}

export async function findPerson(trx: Trx, shopId: string, id: string): Promise<PersonRow | undefined> {
  const { rows } = await trx.raw<{ rows: PersonRow[] }>(PEOPLE, { shopId, id });
  return rows[0];
}

/** Takes the person's row, as whoever books them does, until the transaction ends. */
export async function lockPerson(trx: Trx, shopId: string, id: string): Promise<void> {
  await trx('person').where({ shop_id: shopId, id }).forNoKeyUpdate().select('id');
}

export type PersonColumns = {
  name: string;
  skills: string[];
  sprayTrainedOn: string | null;
  leavesOn: string | null;
  retiredAt: Date | null;
};

/** At the end of the roster. */
export async function insertPerson(
  trx: Trx,
  shopId: string,
  person: Pick<PersonColumns, 'name' | 'skills' | 'sprayTrainedOn'> & { id: string },
): Promise<void> {
  await trx('person').insert({
    shop_id: shopId,
    id: person.id,
    name: person.name,
    skills: person.skills,
    spray_trained_on: person.sprayTrainedOn,
    position: trx('person').where({ shop_id: shopId }).select(trx.raw('coalesce(max(position), 0) + 1')),
  });
}

/** Fields that are given; counts the version up. */
export async function updatePerson(trx: Trx, shopId: string, id: string, given: Partial<PersonColumns>): Promise<void> {
  await trx('person')
    .where({ shop_id: shopId, id })
    .update({
      ...(given.name === undefined ? {} : { name: given.name }),
      ...(given.skills === undefined ? {} : { skills: given.skills }),
      ...(given.sprayTrainedOn === undefined ? {} : { spray_trained_on: given.sprayTrainedOn }),
      ...(given.leavesOn === undefined ? {} : { leaves_on: given.leavesOn }),
      ...(given.retiredAt === undefined ? {} : { retired_at: given.retiredAt }),
      version: trx.raw('version + 1'),
    });
}

export async function replaceShifts(
  trx: Trx,
  shopId: string,
  personId: string,
  shifts: readonly Shift[],
): Promise<void> {
  await trx('shift').where({ shop_id: shopId, person_id: personId }).delete();
  if (shifts.length === 0) return;
  await trx('shift').insert(
    shifts.map(({ startsLocal, rule, minutes, breaks }) => ({
      shop_id: shopId,
      id: uuid(),
      person_id: personId,
      starts_local: startsLocal,
      rule,
      minutes,
      breaks: JSON.stringify(breaks),
    })),
  );
}

/** Ties at most one account to a person. False where the member is not of this shop. */
export async function tieMember(trx: Trx, shopId: string, personId: string, memberId: string | null): Promise<boolean> {
  await trx('membership').where({ shop_id: shopId, person_id: personId }).update({ person_id: null });
  if (memberId === null) return true;
  const tied = await trx('membership').where({ shop_id: shopId, id: memberId }).update({ person_id: personId });
  return tied === 1;
}

/** Positions as the ids stand. */
export async function setPeopleOrder(trx: Trx, shopId: string, personIds: readonly string[]): Promise<void> {
  await trx.raw(
    `update person set position = o.at from unnest(:personIds::uuid[]) with ordinality o (id, at)
     where person.shop_id = :shopId and person.id = o.id`,
    { shopId, personIds: [...personIds] },
  );
}

/** Skills that current process sheets ask for, then those that people have; each once. */
export async function listSkills(trx: Trx, shopId: string): Promise<string[]> {
  const { rows } = await trx.raw<{ rows: { skill: string }[] }>(
    `select skill, min(source) as source from (
       select jsonb_path_query(v.body, '$.stages[*].ways[*].skill') #>> '{}' as skill, 1 as source
       from process_sheet s join process_sheet_version v
         on v.shop_id = s.shop_id and v.process_sheet_id = s.id and v.version = s.version
       where s.shop_id = :shopId and s.retired_at is null
       union all
       select unnest(skills), 2 from person where shop_id = :shopId and retired_at is null
     ) used where skill is not null group by skill order by 2, 1`,
    { shopId },
  );
  return rows.map(({ skill }) => skill);
}

export const listTies = (trx: Trx, shopId: string): Promise<{ id: string; name: string; personId: string | null }[]> =>
  trx('membership')
    .join('account', 'account.id', 'membership.account_id')
    .where({ 'membership.shop_id': shopId })
    .whereNull('membership.disabled_at')
    .orderBy(['account.name', 'membership.id'])
    .select({ id: 'membership.id', name: 'account.name', personId: 'membership.person_id' });

export async function findShopFrame(trx: Trx, shopId: string): Promise<{ timeZone: string; trainingBlocks: boolean }> {
  const shop = await trx('shop')
    .where({ id: shopId })
    .first<{ timeZone: string; trainingBlocks: boolean } | undefined>({
      timeZone: 'time_zone',
      trainingBlocks: 'training_blocks',
    });
  if (!shop) throw new Error(`Shop ${shopId} is not there, or this transaction has not entered it.`);
  return shop;
}
