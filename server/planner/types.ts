/** The planning problem and the plan, version 1. All times are whole minutes from `origin`; intervals are half-open. */

export type Minutes = number;
/** `[from, to)` in minutes from the problem's origin. */
export type Interval = readonly [from: Minutes, to: Minutes];

export type PhaseKind = 'setup' | 'work' | 'spray' | 'flash' | 'purge' | 'bake' | 'cool';
export type Attendance = 'hands' | 'onsite' | 'none';
export type PlaceKind = 'booth' | 'prep' | 'rack';

export type Phase = {
  kind: PhaseKind;
  minutes: Minutes;
  attendance: Attendance;
  /** True: the lamps are on during this phase. */
  lamp?: boolean;
  /** At most this many idle minutes may follow before the next phase; 0 where absent. */
  wait?: Minutes;
};

export type Gap = {
  /** Least minutes after the previous stage ends: flash, dust-free, cool-down. */
  min: Minutes;
  /** Most minutes after it, null for no limit: recoat window, pot life, bake while wet. */
  max: Minutes | null;
  /** Minutes for which the previous stage's place stays taken after it ends; never more than `min`. */
  settle: Minutes;
};

export type Mode = {
  id: string;
  places: string[];
  /** True: the part stays where the previous stage left it, and the place is held from then on. */
  stay: boolean;
  people: string[];
  lamps: string[];
  lampCount: number;
  units: number;
  family: string | null;
  load: string | null;
  gap: Gap;
  /** True: hands-on work may pause when the person's shift pauses, and go on when it resumes. */
  split: boolean;
  phases: Phase[];
};

export type Stage = { id: string; kind: string; modes: Mode[] };
export type Job = { id: string; release: Minutes; due: Minutes | null; weight: number; stages: Stage[] };

export type Place = { id: string; kind: PlaceKind; zone: string | null; units: number; closed: Interval[] };
export type Lamp = { id: string; kw: number; circuit: string; closed: Interval[] };
export type Circuit = { id: string; kw: number };
export type Person = { id: string; working: Interval[] };
export type Cleanup = { from: string; to: string; minutes: Minutes };

export type Objective = {
  tardiness: number;
  flow: number;
  makespan: number;
  booth: number;
  moves: number;
  unplaced: number;
};

export type Assignment = {
  stage: string;
  mode: string;
  place: string;
  /** Null where no phase needs hands. */
  person: string | null;
  lamps: string[];
  /** Null, or a key shared by the stages that run together. */
  load: string | null;
  start: Minutes;
  end: Minutes;
  phases: Interval[];
};

export type Problem = {
  version: 1;
  /** ISO 8601 instant of minute 0. */
  origin: string;
  now: Minutes;
  horizon: Minutes;
  open: Interval[];
  purge: Minutes;
  lampMove: Minutes;
  cleanups: Cleanup[];
  places: Place[];
  lamps: Lamp[];
  circuits: Circuit[];
  people: Person[];
  jobs: Job[];
  fixed: Assignment[];
  baseline: Assignment[];
  objective: Objective;
};

export type Unplaced = { job: string; stage: string; reason: string };

export type Stats = { evaluations: number; improvements: number };

export type Plan = {
  version: 1;
  assignments: Assignment[];
  unplaced: Unplaced[];
  cost: number;
  /** A sound lower bound of the cost, where one is known. */
  bound?: number;
  stats: Stats;
};

export type CostParts = Record<keyof Objective, number>;

/** What can be wrong with a plan; the rule's number is in `Violation.rule`. `ids` and `minutes` are listed beside each code. */
export type ViolationCode =
  // 1 Order
  | 'unknown-stage'
  | 'assigned-twice'
  | 'half-unplaced'
  | 'unplaced-without-reason'
  | 'stage-missing'
  | 'unknown-mode' // ids: mode
  | 'phase-count' // minutes: given, needed
  | 'not-whole-minutes'
  | 'ends-not-of-phases'
  | 'before-now' // minutes: start, now
  | 'after-horizon' // minutes: end, horizon
  | 'before-release' // minutes: start, release
  | 'unknown-place' // ids: place
  | 'place-not-allowed' // ids: place
  | 'previous-missing'
  | 'phase-wait' // minutes: phase, idle, most
  | 'phase-length' // minutes: phase, given, needed
  // 2 Windows
  | 'too-soon' // ids: previous stage; minutes: gap, least
  | 'too-late' // ids: previous stage; minutes: gap, most
  // 3 Holding a place
  | 'moved-while-staying' // ids: place
  // 4 One load at a time
  | 'does-not-fit' // ids: place; minutes: units wanted, units there
  | 'place-taken' // ids: place, other stage; minutes: start, other's end of hold
  | 'rack-full' // ids: place; minutes: from
  // 5 Loads
  | 'load-not-shared'
  | 'load-differs'
  | 'load-kinds-differ'
  | 'load-too-big' // ids: place; minutes: units wanted, units there
  | 'load-parts' // the next stages do not all stay as one load
  | 'load-is-fixed'
  // 6 Clean-up
  | 'clean-up' // ids: place, other stage; minutes: there, needed
  // 7 Closed
  | 'place-closed' // ids: place; minutes: closed from, to
  | 'lamp-closed' // ids: lamp; minutes: closed from, to
  // 8 Hands
  | 'person-not-allowed' // ids: person
  | 'person-not-needed' // ids: person
  | 'off-shift' // ids: person; minutes: phase, from, to
  | 'person-busy' // ids: person, other stage; minutes: from, other's from, other's to
  // 9 On the premises
  | 'nobody-there' // minutes: phase, from, to
  // 10 Lamps
  | 'wrong-lamps' // ids: lamps given; minutes: lamps wanted
  | 'no-lamp-in-mode' // minutes: phase
  | 'unknown-lamp' // ids: lamp
  | 'lamp-busy' // ids: lamp, other stage; minutes: from, other's to, minutes to move
  // 11 Circuits
  | 'circuit-full' // ids: circuit; minutes: from
  // 12 Spray and lamps
  | 'spray-meets-lamp' // ids: zone, spraying stage; minutes: lamp from, to, spray from, to
  // 13 Fixed
  | 'fixed-missing'
  | 'fixed-changed';

/**
 * One broken rule of a plan: the rule's number (1 to 13), a code that a catalogue turns into a sentence, the stage it
 * is about (the job where a whole job is meant), the ids of what it clashes with, and the minutes that explain it.
 * No sentences here: the reader's language and clock belong to whoever shows it.
 */
export type Violation = {
  rule: number;
  code: ViolationCode;
  stage: string;
  ids: string[];
  minutes: Minutes[];
};

export type Verdict = { violations: Violation[]; cost: number; parts: CostParts };

export type Progress = { cost: number; bound: number | null; evaluations: number; unplaced: number };

export type PlanOptions = {
  seed: number;
  /** Budget counted in evaluations: same seed and budget, same plan. Unlimited where absent (then `stop` must end it). */
  evaluations?: number;
  /** Asked often; true ends the search with the best so far. */
  stop?: () => boolean;
  /**
   * How much of the time is gone, 0 to 1: with it the search cools down in time for the end that `stop` sets. Without it
   * the evaluations tell, and without those it runs in rounds that grow.
   */
  share?: () => number;
  /** Called for the first plan and for each improvement. */
  onProgress?: (progress: Progress) => void;
};
