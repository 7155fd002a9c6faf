import type { Shop } from '../engine/shop.ts';
import { below, type Random } from '../random.ts';
import { attempt, type Search, sortByStart } from './candidate.ts';

/** Two jobs meet on a machine while the second starts more than `lo` and less than `hi` minutes after the first. */
type Meeting = { other: number; lo: number; hi: number };

/** Moves per job without success after which the search scatters the jobs. */
const RESTART = 100;
/** By how much a pair that meets grows dearer, where 1 is the weight to begin with. */
const DEARER = 0.3;

type Shifts = {
  jobs: number;
  length: Int32Array;
  release: Int32Array;
  meetings: Meeting[][];
  start: Int32Array;
  /** Weight of each pair: what keeps meeting grows dearer. */
  weight: Float64Array;
  /** Per job, how many others it meets. */
  meets: Int32Array;
  /** Number of meetings, each seen from both sides. */
  all: number;
  /** Sums over the starts of the job looked at. */
  profile: Float64Array;
  tabu: Int32Array;
};

function shiftsOf(s: Search): Shifts {
  const { shop } = s.d;
  const n = shop.jobs.length;
  const length = Int32Array.from(shop.jobs, ({ first, last }) => sumMinutes(shop, first, last + 1));
  const most = s.cost + 2;
  return {
    jobs: n,
    length,
    release: Int32Array.from(shop.jobs, (job) => Math.max(job.release, shop.now)),
    meetings: shop.jobs.map((_, j) => meetingsOf(shop, j)),
    start: Int32Array.from(shop.jobs, (job) => s.heldPlacing.start[job.first]!),
    weight: new Float64Array(n * n).fill(1),
    meets: new Int32Array(n),
    all: 0,
    profile: new Float64Array(Math.max(most, shop.horizon) + 2),
    tabu: new Int32Array(n),
  };
}

const sumMinutes = (shop: Shop, from: number, to: number): number => {
  let sum = 0;
  for (let k = from; k < to; k++) sum += shop.ways[k]![0]!.minutes;
  return sum;
};

/** Where job `j` may not start, relative to the starts of all others. */
function meetingsOf(shop: Shop, j: number): Meeting[] {
  const own = operations(shop, j);
  return shop.jobs.flatMap((_, other) => {
    if (other === j) return [];
    const theirs = operations(shop, other);
    return own.flatMap((a) =>
      theirs
        .filter((b) => b.place === a.place)
        .map((b) => ({ other, lo: b.at - a.at - a.minutes, hi: b.at + b.minutes - a.at })),
    );
  });
}

function operations(shop: Shop, j: number): { place: number; at: number; minutes: number }[] {
  const { first, last } = shop.jobs[j]!;
  let at = 0;
  return Array.from({ length: last - first + 1 }, (_, k) => {
    const way = shop.ways[first + k]![0]!;
    const op = { place: way.places[0]!, at, minutes: way.minutes };
    at += way.minutes;
    return op;
  });
}

/** Moves job `j` to the start with the least weight of meetings before `end`, of equals one by lot. Returns the change. */
function moveJob(w: Shifts, j: number, end: number, random: Random): number {
  const { profile, start, weight } = w;
  const from = w.release[j]!;
  const to = end - w.length[j]!;
  profile.fill(0, from, to + 2);
  for (const { other, lo, hi } of w.meetings[j]!) {
    const a = Math.max(from, start[other]! + lo + 1);
    const b = Math.min(to, start[other]! + hi - 1);
    if (a > b) continue;
    profile[a]! += weight[j * w.jobs + other]!;
    profile[b + 1]! -= weight[j * w.jobs + other]!;
  }
  let sum = 0;
  let least = Infinity;
  let ties = 0;
  let best = start[j]!;
  let now = Infinity;
  for (let t = from; t <= to; t++) {
    sum += profile[t]!;
    if (t === start[j]) now = sum;
    else if (sum < least - 1e-9) {
      least = sum;
      best = t;
      ties = 1;
    } else if (sum < least + 1e-9 && random() * ++ties < 1) best = t;
  }
  start[j] = best;
  return least - now;
}

/** Counts who meets whom from scratch. */
function countMeetings(w: Shifts): void {
  w.all = 0;
  w.meets.fill(0);
  for (let j = 0; j < w.jobs; j++)
    for (const { other, lo, hi } of w.meetings[j]!) {
      const d = w.start[j]! - w.start[other]!;
      if (d > lo && d < hi) {
        w.meets[j]!++;
        w.all++;
      }
    }
}

/** Adds (or takes away: `sign` -1) the meetings of job `j`, its own and those of the others with it. */
function countJob(w: Shifts, j: number, sign: number): void {
  for (const { other, lo, hi } of w.meetings[j]!) {
    const d = w.start[j]! - w.start[other]!;
    if (d > lo && d < hi) {
      w.meets[j]! += sign;
      w.meets[other]! += sign;
      w.all += 2 * sign;
    }
  }
}

/** Makes every pair that meets a little dearer. */
function learn(w: Shifts): void {
  for (let j = 0; j < w.jobs; j++) {
    if (w.meets[j] === 0) continue;
    for (const { other, lo, hi } of w.meetings[j]!) {
      const d = w.start[j]! - w.start[other]!;
      if (d > lo && d < hi) w.weight[j * w.jobs + other]! += DEARER;
    }
  }
}

/**
 * Searches a no-wait job shop: each job is one rigid shape that slides along the machines. Everything has to end before
 * the best end known; a job that meets others moves to where it meets the least, and pairs that keep meeting grow dearer
 * (the breakout method, Morris 1993), until no two meet. Then the end is lowered again.
 */
export function planNoWait(s: Search, random: Random, over: () => boolean, keep: () => void): void {
  const w = shiftsOf(s);
  for (let n = 1, end = lower(w, s); ; n++) {
    s.evaluations++;
    if (over()) return;
    if (w.length.some((l, j) => w.release[j]! + l > end)) return; // no job is shorter than itself
    if (w.all === 0) {
      take(s, w);
      keep();
      end = lower(w, s);
      w.weight.fill(1);
      continue;
    }
    const j = pick(w, n, random);
    countJob(w, j, -1);
    const change = moveJob(w, j, end, random);
    countJob(w, j, 1);
    if (change >= 0) learn(w);
    w.tabu[j] = n + 1 + below(random, 1 + (w.jobs >> 2));
    if (n % (RESTART * w.jobs) === 0) scatter(w, end, random);
  }
}

/** Every job to some start, and all pairs equally dear again. */
function scatter(w: Shifts, end: number, random: Random): void {
  w.weight.fill(1);
  for (let j = 0; j < w.jobs; j++) w.start[j] = w.release[j]! + below(random, end - w.length[j]! - w.release[j]! + 1);
  countMeetings(w);
}

/** A job that meets another, by lot, rather not one that has just moved. */
function pick(w: Shifts, n: number, random: Random): number {
  let chosen = -1;
  let free = 0;
  let any = 0;
  let other = 0;
  for (let j = 0; j < w.jobs; j++) {
    if (w.meets[j] === 0) continue;
    if (random() * ++any < 1) other = j;
    if (w.tabu[j]! <= n && random() * ++free < 1) chosen = j;
  }
  return chosen >= 0 ? chosen : other;
}

/** The next end to reach, one minute below the best; jobs that pass it are pushed back. */
function lower(w: Shifts, s: Search): number {
  const end = s.ledger.last - 1;
  for (let j = 0; j < w.jobs; j++) w.start[j] = Math.max(w.release[j]!, Math.min(w.start[j]!, end - w.length[j]!));
  countMeetings(w);
  return end;
}

/** Decodes the starts found: every job waits for its own. */
function take(s: Search, w: Shifts): void {
  const { d } = s;
  const { shop } = d;
  shop.jobs.forEach((job, j) => (d.wishOf[job.first] = w.start[j]!));
  const by = (id: number): number => w.start[shop.blocks[id]!.job]!;
  s.order.set([...s.order].sort((x, y) => by(x) - by(y) || x - y));
  attempt(s, 0, Infinity);
  sortByStart(s);
}
