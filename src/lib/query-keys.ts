import type { ChangeKind } from '#contracts/live.ts';

/**
 * First parts of every query key about a shop: `[shopId, topic, ...]`. A feature begins its keys with `shopKey`, so that
 * a notice finds them.
 */
export type Topic =
  | 'day'
  | 'draft'
  | 'plan-run'
  | 'jobs'
  | 'job'
  | 'bench'
  | 'use'
  | 'members'
  | 'letters'
  | 'sheets'
  | 'setup'
  | 'people'
  | 'air';

export const shopKey = (shopId: string, topic: Topic, ...more: unknown[]): readonly unknown[] => [
  shopId,
  topic,
  ...more,
];

const planned: Topic[] = ['day', 'jobs', 'job', 'bench', 'use'];
const drafted: Topic[] = ['day', 'draft'];
const worked: Topic[] = ['day', 'draft', 'jobs', 'job', 'bench', 'use'];

/** What is asked again when something has changed. One table, complete by its type. */
export const topicsOf: Record<ChangeKind, readonly Topic[]> = {
  'job-created': ['day', 'jobs'],
  'job-changed': worked,
  'job-withdrawn': worked,
  'stage-started': worked,
  'stage-finished': worked,
  'draft-opened': drafted,
  'draft-changed': drafted,
  'draft-dropped': drafted,
  'plan-posted': [...planned, 'draft', 'letters'],
  'plan-run': ['day', 'plan-run'],
  'member-changed': ['members'],
  'member-invited': ['members', 'letters'],
  'shop-changed': [...drafted, 'setup', 'use'],
  'people-changed': [...drafted, 'people', 'bench'],
  'sheets-changed': ['sheets', 'job'],
  'air-read': ['air', 'day', 'bench'],
  'trace-attached': ['job'],
  'trace-removed': ['job'],
};
