import { spans, type SpanKind } from './day-range.ts';
import { localDay } from '#contracts/common.ts';

/** What the address says: a link sent to a colleague opens the same view. */
export type DayLink = {
  date: string;
  span: SpanKind;
  /** Null: the draft for those who plan, the posted plan for the others. */
  plan: 'posted' | 'draft' | null;
  stage: string | null;
  people: boolean;
  allHours: boolean;
};

/** Reads the address; what makes no sense counts as not said. */
export function readDayLink(params: URLSearchParams, today: string): DayLink {
  const date = localDay.safeParse(params.get('date'));
  const plan = params.get('plan');
  return {
    date: date.success ? date.data : today,
    span: spans.find((kind) => kind === params.get('view')) ?? 'day',
    plan: plan === 'posted' || plan === 'draft' ? plan : null,
    stage: params.get('stage'),
    people: params.get('people') !== 'hidden',
    allHours: params.get('hours') === 'all',
  };
}

/** The shortest address that says it. */
export function writeDayLink(link: DayLink, today: string): URLSearchParams {
  const params = new URLSearchParams();
  if (link.date !== today) params.set('date', link.date);
  if (link.span !== 'day') params.set('view', link.span);
  if (link.plan) params.set('plan', link.plan);
  if (link.stage) params.set('stage', link.stage);
  if (!link.people) params.set('people', 'hidden');
  if (link.allHours) params.set('hours', 'all');
  return params;
}
