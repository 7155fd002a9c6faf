import { describe, expect, it } from 'vitest';
import { nextSort, pagesOf, readListLink, sortedBy, withLink, writeListLink } from './list-link.ts';

const read = (address: string) => readListLink(new URLSearchParams(address));

describe('the address of the jobs list', () => {
  it('says nothing for open jobs by promise', () => {
    expect(read('')).toEqual({ state: 'open', sort: 'promise', page: 1, size: 50 });
    expect(writeListLink(read('')).toString()).toBe('');
  });

  it('comes back as it was written', () => {
    const link = { ...read(''), q: 'tail & gate', state: 'late' as const, sort: '-number' as const, page: 3 };
    expect(readListLink(writeListLink(link))).toEqual(link);
  });

  it('takes what makes no sense as not said, and keeps the rest', () => {
    expect(read('state=lost&sort=colour&page=-2&q=door')).toEqual({ ...read(''), q: 'door' });
    expect(read(`q=${'x'.repeat(101)}&state=done`)).toEqual({ ...read(''), state: 'done' });
  });

  it('goes back to the first page when something else is asked for', () => {
    expect(withLink({ ...read('page=4') }, { state: 'done' }).page).toBe(1);
    expect(withLink({ ...read('') }, { page: 2 }).page).toBe(2);
  });
});

describe('sorting by heads', () => {
  it('sorts by the column, then turns round', () => {
    expect(nextSort('promise', 'number')).toBe('number');
    expect(nextSort('number', 'number')).toBe('-number');
    expect(nextSort('-number', 'number')).toBe('number');
    expect(sortedBy('-number', 'number')).toBe('descending');
    expect(sortedBy('-number', 'title')).toBe('none');
  });

  it('counts at least one page', () => {
    expect([pagesOf(0, 50), pagesOf(50, 50), pagesOf(51, 50)]).toEqual([1, 1, 2]);
  });
});
