import { availableParallelism } from 'node:os';
import type { TaskKind } from '#server/db/tasks.ts';
import { openPlannerThreads } from '#server/planning/planner-threads.ts';
import { twoSeeds } from '#server/planning/two-seeds.ts';
import type { TaskDefinition } from './task-function.ts';
import { letterIsDead } from './tasks/deliver.ts';
import { lookAtPeople } from './tasks/look-at-people.ts';
import { prune } from './tasks/prune.ts';
import { planWith } from './tasks/run-plan.ts';
import { resetDemo } from './tasks/reset-demo.ts';
import { sendInvitation } from './tasks/send-invitation.ts';
import { sendLetter } from './tasks/send-letter.ts';
import { sendReset } from './tasks/send-reset.ts';
import { sendSignUp } from './tasks/send-sign-up.ts';
import { sweepFiles } from './tasks/sweep-files.ts';

/** What the worker knows to do, by kind. Ten attempts with growing delays are about three hours. */
export const registry: Partial<Record<TaskKind, TaskDefinition>> = {
  'send-letter': { run: sendLetter, attempts: 10, onDead: letterIsDead },
  'send-invitation': { run: sendInvitation, attempts: 10, onDead: letterIsDead },
  // Who waits for a link has asked again, or given up, after that.
  'send-reset': { run: sendReset, attempts: 7 },
  'send-sign-up': { run: sendSignUp, attempts: 7 },
  'run-plan': planWith(twoSeeds(openPlannerThreads(availableParallelism()))),
  'look-at-people': { run: lookAtPeople, attempts: 5 },
  'reset-demo': { run: resetDemo, attempts: 3 },
  prune: { run: prune, attempts: 5 },
  'sweep-files': { run: sweepFiles, attempts: 5 },
};

export type Lane = { kinds: readonly TaskKind[]; runners: number };

/** What runs beside what: letters wait for the network, a plan run for the processor. */
export const lanes: readonly Lane[] = [
  { kinds: ['send-letter', 'send-invitation', 'send-reset', 'send-sign-up'], runners: 4 },
  { kinds: ['run-plan'], runners: 1 },
  { kinds: ['reset-demo', 'look-at-people', 'prune', 'sweep-files'], runners: 1 },
];
