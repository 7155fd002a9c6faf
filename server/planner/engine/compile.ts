import type { Problem } from '../types.ts';
import { blocksOf } from './blocks.ts';
import { makeCalendar } from './calendar.ts';
import { makeJoints } from './joint-ways.ts';
import { addLoads } from './load-mates.ts';
import { BOOTH, type CompiledJob, PREP, RACK, type Shop, type Way } from './shop.ts';
import { compileWay, type Indexes, indexesOf, indexOf, sortByDemand } from './ways.ts';

const KIND = { booth: BOOTH, prep: PREP, rack: RACK } as const;

function cleanupTable(problem: Problem, family: Map<string, number>): Int32Array {
  const table = new Int32Array(family.size * family.size);
  for (const c of problem.cleanups) table[family.get(c.from)! * family.size + family.get(c.to)!] = c.minutes;
  return table;
}

type Zones = { placeZone: Int32Array; zoneCount: number };

function zonesOf(problem: Problem): Zones {
  const names = [...new Set(problem.places.flatMap((p) => p.zone ?? []))];
  const zone = new Map(names.map((name, i) => [name, i]));
  return {
    placeZone: Int32Array.from(problem.places, (p) => (p.zone === null ? -1 : zone.get(p.zone)!)),
    zoneCount: names.length,
  };
}

/** Turns a parsed problem into indexes and typed arrays. Done once; the search never looks at the problem again. */
export function compileShop(problem: Problem): Shop {
  const at = indexesOf(problem);
  const { family, placeUnits } = at;
  const circuit = indexOf(problem.circuits);
  const stages = problem.jobs.flatMap((job) => job.stages);
  let wayId = 0;
  const ways = stages.map((stage) => stage.modes.map((mode) => compileWay(wayId++, mode, at)));
  const lampKw = Float64Array.from(problem.lamps, (l) => l.kw);
  const cleanup = cleanupTable(problem, family);
  sortByDemand(ways.flat(), problem.places.length, problem.people.length, lampKw);
  const shop: Shop = {
    problem,
    now: problem.now,
    horizon: problem.horizon,
    open: makeCalendar(problem.open),
    purge: problem.purge,
    lampMove: problem.lampMove,
    placeCount: problem.places.length,
    placeKind: Uint8Array.from(problem.places, (p) => KIND[p.kind]),
    placeUnits,
    ...zonesOf(problem),
    placeClosed: problem.places.map((p) => makeCalendar(p.closed)),
    personCount: problem.people.length,
    working: problem.people.map((p) => makeCalendar(p.working)),
    lampCount: problem.lamps.length,
    lampKw,
    lampCircuit: Int32Array.from(problem.lamps, (l) => circuit.get(l.circuit)!),
    lampClosed: problem.lamps.map((l) => makeCalendar(l.closed)),
    circuitCount: problem.circuits.length,
    circuitKw: Float64Array.from(problem.circuits, (c) => c.kw),
    families: family.size,
    cleanup,
    longestCleanup: cleanup.reduce((x, y) => Math.max(x, y), 0),
    stageCount: stages.length,
    stageJob: new Int32Array(stages.length),
    stageIds: stages.map((s) => s.id),
    ways,
    jobs: [],
    blocks: [],
    blockOf: new Int32Array(stages.length).fill(-1),
    fixedAt: new Int32Array(stages.length).fill(-1),
    fixedWays: fixedWays(problem, at),
    maxSegments: Math.max(1, ...stages.flatMap((s) => s.modes.map((m) => m.phases.length))),
    maxLamps: Math.max(0, ...ways.flat().map((w) => w.lampCount), ...problem.fixed.map((f) => f.lamps.length)),
    basePlace: new Int32Array(stages.length).fill(-1),
    basePerson: new Int32Array(stages.length).fill(-1),
    baseStart: new Int32Array(stages.length).fill(-1),
    tail: new Int32Array(stages.length),
    joints: makeJoints(at, wayId),
    mates: [],
    shares: false,
    standing: [],
    published: [],
  };
  return withJobs(shop, at);
}

function withJobs(shop: Shop, at: Indexes): Shop {
  addJobs(shop);
  addKnown(shop, at);
  for (const job of shop.jobs) blocksOf(shop, job);
  addLoads(shop);
  return shop;
}

function fixedWays(problem: Problem, at: Indexes): Way[] {
  const stage = new Map(problem.jobs.flatMap((job) => job.stages.map((s) => [s.id, s])));
  return problem.fixed.map((f) => {
    const mode = stage.get(f.stage)!.modes.find((m) => m.id === f.mode)!;
    return compileWay(-1, mode, at, true);
  });
}

function addJobs(shop: Shop): void {
  let first = 0;
  for (const job of shop.problem.jobs) {
    const last = first + job.stages.length - 1;
    const compiled: CompiledJob = {
      first,
      last,
      release: job.release,
      due: job.due ?? -1,
      weight: job.weight,
      blocks: [],
    };
    shop.stageJob.fill(shop.jobs.length, first, last + 1);
    for (let s = last - 1; s >= first; s--) {
      const least = Math.min(...shop.ways[s + 1]!.map((w) => w.gapMin + w.minutes));
      shop.tail[s] = shop.tail[s + 1]! + least;
    }
    shop.jobs.push(compiled);
    first = last + 1;
  }
}

/** Notes what is fixed and what the published plan says. */
function addKnown(shop: Shop, at: Indexes): void {
  const stage = new Map(shop.stageIds.map((id, s) => [id, s]));
  shop.problem.fixed.forEach((f, i) => (shop.fixedAt[stage.get(f.stage)!] = i));
  for (const b of shop.problem.baseline) {
    const s = stage.get(b.stage);
    if (s === undefined || shop.fixedAt[s] !== -1) continue;
    shop.basePlace[s] = at.place.get(b.place) ?? -1;
    shop.basePerson[s] = b.person === null ? -1 : (at.person.get(b.person) ?? -1);
    shop.baseStart[s] = b.start;
  }
}
