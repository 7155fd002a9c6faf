import { NEVER } from './engine/calendar.ts';
import { floorOf, placeChain } from './engine/chain.ts';
import type { Decoder } from './engine/decode.ts';
import { onceJoint } from './engine/joint-ways.ts';
import { MOST_MEMBERS, placeParty } from './engine/party.ts';
import type { Block, Shop, Variant } from './engine/shop.ts';
import { compileWay } from './engine/ways.ts';
import type { Assignment, Minutes, Mode, Plan } from './types.ts';

export type Member = { block: Block; planned: Assignment[] };
/** What is placed at once: a block, or the blocks that the plan runs as one load, the one that leads it first. */
export type Step = { members: Member[]; at: Minutes };

/** Blocks whose stages the plan places, in the order of their starts. */
export function plannedSteps(shop: Shop, plan: Plan): Step[] {
  const given = new Map(plan.assignments.map((a) => [a.stage, a]));
  const members = shop.blocks.flatMap((block): Member[] => {
    const planned = shop.stageIds.slice(block.first, block.last + 1).flatMap((id) => given.get(id) ?? []);
    return planned.length === block.last - block.first + 1 ? [{ block, planned }] : [];
  });
  const loads = new Map<string, Member[]>();
  for (const member of members) {
    const key = loadsOf(member).join(' ') || `block ${member.block.id}`;
    loads.set(key, [...(loads.get(key) ?? []), member]);
  }
  const steps = [...loads.values()].flatMap((together): Step[] =>
    together.length <= MOST_MEMBERS && new Set(together.map(({ block }) => block.job)).size === together.length
      ? [stepOf(together)]
      : together.map((member) => stepOf([member])),
  );
  return steps.sort((x, y) => x.at - y.at || x.members[0]!.block.id - y.members[0]!.block.id);
}

/** A load is ready when the last of its members is. */
const stepOf = (members: Member[]): Step => ({
  members,
  at: Math.max(...members.map(({ planned }) => planned[0]!.start)),
});

const loadsOf = ({ planned }: Member): string[] => planned.flatMap(({ load }) => load ?? []);

/** Places a step with these modes. Returns the stage that found no room, or -1. */
export function runStep(d: Decoder, { members }: Step, modes: readonly Mode[][]): number {
  if (members.length > 1 && asLoad(d, members, modes)) return placeParty(d, d.party) ? -1 : members[0]!.block.first;
  for (const [i, { block }] of members.entries()) {
    const stuck = placeChain(d, block, variantOf(d.shop, modes[i]!), NEVER);
    if (stuck >= 0) return stuck;
  }
  return -1;
}

/** Fills the party. False: the stages are not such as the planner runs together. */
function asLoad(d: Decoder, members: readonly Member[], modes: readonly Mode[][]): boolean {
  const { party, shop } = d;
  const shared = loadsOf(members[0]!).length;
  party.count = members.length;
  party.ways.length = 0;
  for (const [i, { block, planned }] of members.entries()) {
    const variant = variantOf(shop, modes[i]!);
    party.blocks[i] = block;
    party.heads[i] = planned.findIndex(({ load }) => load !== null);
    party.options[i] = [variant];
    party.limits[i] = NEVER;
    party.floors[i] = floorOf(d, block, variant.ways[0]!.gapMax);
  }
  for (let k = 0; k < shared; k++) {
    const way = onceJoint(
      shop,
      members.flatMap((_, i) => modes[i]![party.heads[i]! + k] ?? []),
    );
    if (!way) return false;
    party.ways.push(way);
  }
  return true;
}

/** Modes drawn for once, as the one way of a block. */
function variantOf(shop: Shop, modes: readonly Mode[]): Variant {
  const ways = modes.map((mode) => compileWay(-1, mode, shop.joints.indexes));
  return { ways, pins: new Int32Array(ways.length).fill(-1), rest: new Int32Array(ways.length) };
}
