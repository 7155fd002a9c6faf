import type { Mode, Problem } from '../types.ts';
import type { Calendar } from './calendar.ts';
import type { Joints } from './joint-ways.ts';

/** What a segment asks of people and the premises. */
export const NONE = 0;
export const HANDS = 1;
export const ONSITE = 2;
/** Hands that may pause where the person's shift pauses. */
export const PAUSED = 3;

/** A way by itself; the way of a load, which holds place, person and lamps for all of it; a member's way beside that one. */
export const ALONE = 0;
export const LEADS = 1;
export const RIDES = 2;

/**
 * A mode, compiled. Phases that follow each other back to back and need the same attendance are merged into segments,
 * so that a spray stage of seven phases asks its painter's calendar once.
 */
export type Way = {
  id: number;
  stay: boolean;
  /** Places that will do and are big enough, least flexible first. */
  places: Int32Array;
  people: Int32Array;
  lamps: Int32Array;
  lampCount: number;
  units: number;
  family: number;
  /** Stages whose ways have the same number here may run as one load; -1: never. */
  load: number;
  gapMin: number;
  gapMax: number;
  settle: number;
  hands: boolean;
  segments: number;
  segMinutes: Int32Array;
  segNeed: Int32Array;
  /** Idle minutes that may follow the segment. */
  segWait: Int32Array;
  phaseSeg: Int32Array;
  phaseOffset: Int32Array;
  phaseMinutes: Int32Array;
  /** Phases in which lamps are lit. */
  lit: Int32Array;
  firstSpray: number;
  lastSpray: number;
  /** Least minutes from start to end. */
  minutes: number;
  /** One segment or several without waits and pauses: start and end are always `minutes` apart. */
  rigid: boolean;
  /** One segment per phase, each with its own length: the way of a fixed assignment, whose minutes reality wrote. */
  apart: boolean;
  /** What it was compiled from; for a load all members' as one. */
  mode: Mode;
  /** ALONE, LEADS or RIDES. */
  share: number;
};

/** One choice of ways for the stages of a block, and per stage the place where a chain of stays begins (-1: any). */
export type Variant = {
  ways: Way[];
  pins: Int32Array;
  /** Per stage the least minutes from its end to the end of the block. */
  rest: Int32Array;
};

/** Stages of one job that are placed together, because the next one may stay, settle or be due at once. */
export type Block = { id: number; job: number; first: number; last: number; variants: Variant[] };

export type CompiledJob = {
  first: number;
  last: number;
  release: number;
  due: number;
  weight: number;
  /** Ids of its blocks, in order; stages that are fixed belong to none. */
  blocks: number[];
};

export type Shop = {
  problem: Problem;
  now: number;
  horizon: number;
  open: Calendar;
  purge: number;
  lampMove: number;
  placeCount: number;
  placeKind: Uint8Array;
  placeUnits: Float64Array;
  placeZone: Int32Array;
  placeClosed: Calendar[];
  zoneCount: number;
  personCount: number;
  working: Calendar[];
  lampCount: number;
  lampKw: Float64Array;
  lampCircuit: Int32Array;
  lampClosed: Calendar[];
  circuitCount: number;
  circuitKw: Float64Array;
  families: number;
  /** Minutes of clean-up, row by row: `[from * families + to]`. */
  cleanup: Int32Array;
  longestCleanup: number;
  stageCount: number;
  stageJob: Int32Array;
  stageIds: string[];
  /** All ways of each stage, in the order of its modes. */
  ways: Way[][];
  jobs: CompiledJob[];
  blocks: Block[];
  blockOf: Int32Array;
  /** Index in `problem.fixed`, or -1. */
  fixedAt: Int32Array;
  /** The way of each fixed assignment. */
  fixedWays: Way[];
  maxSegments: number;
  maxLamps: number;
  /** Baseline per stage: place (-1: no baseline or fixed), person, start. */
  basePlace: Int32Array;
  basePerson: Int32Array;
  baseStart: Int32Array;
  /** Least minutes from the end of a stage to the end of its job, by durations and least gaps. */
  tail: Int32Array;
  joints: Joints;
  /** Per block those of other jobs that it could share a run with. */
  mates: Int32Array[];
  /** Whether any has a mate. */
  shares: boolean;
  /** Pairs of blocks that go on from one fixed load, and those that run as one load in the baseline. */
  standing: [number, number][];
  published: [number, number][];
};

export const BOOTH = 0;
export const PREP = 1;
export const RACK = 2;
