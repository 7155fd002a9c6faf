import { listJobs } from '#contracts/jobs.ts';
import type * as z from 'zod';

/** What the address of the jobs list says; the same shape that the server is asked with. */
export type ListLink = z.output<typeof listJobs.query>;
export type Filter = ListLink['state'];
export type Sort = ListLink['sort'];
export type SortKey = 'number' | 'title' | 'release' | 'promise';

const standard: ListLink = listJobs.query.parse({});

/** Reads the address; what makes no sense counts as not said. */
export function readListLink(params: URLSearchParams): ListLink {
  const said: Record<string, string> = {};
  for (const key of ['q', 'state', 'sort', 'page'] as const) {
    const value = params.get(key);
    if (value !== null && listJobs.query.shape[key].safeParse(value).success) said[key] = value;
  }
  return listJobs.query.parse(said);
}

/** The shortest address that says it. */
export function writeListLink(link: ListLink): URLSearchParams {
  const params = new URLSearchParams();
  if (link.q) params.set('q', link.q);
  if (link.state !== standard.state) params.set('state', link.state);
  if (link.sort !== standard.sort) params.set('sort', link.sort);
  if (link.page !== standard.page) params.set('page', String(link.page));
  return params;
}

/** A change of what is asked for starts again at the first page. */
export const withLink = (link: ListLink, change: Partial<ListLink>): ListLink => ({ ...link, page: 1, ...change });

export const sortedBy = (sort: Sort, key: SortKey): 'ascending' | 'descending' | 'none' =>
  sort === key ? 'ascending' : sort === `-${key}` ? 'descending' : 'none';

/** A column's head was pressed: it sorts by that column, and turns round when it did already. */
export const nextSort = (sort: Sort, key: SortKey): Sort => (sort === key ? `-${key}` : key);

export const pagesOf = (total: number, size: number): number => Math.max(1, Math.ceil(total / size));
