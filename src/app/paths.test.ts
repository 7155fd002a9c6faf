import { describe, expect, it } from 'vitest';
import { ownPlace, paths } from './paths.ts';

describe('paths', () => {
  it('carry what a page reads', () => {
    expect(paths.day({ date: '2026-03-12' })).toBe('/day?date=2026-03-12');
    expect(paths.signIn('/day?date=2026-03-12#x')).toBe('/sign-in?to=%2Fday%3Fdate%3D2026-03-12%23x');
    expect(paths.signIn('/')).toBe('/sign-in');
  });
});

describe('the place to go to after signing in', () => {
  it('is one of our own', () => {
    expect(ownPlace('/day?date=2026-03-12#x')).toBe('/day?date=2026-03-12#x');
  });
  it.each([
    null,
    '',
    'day',
    'https://elsewhere.example/',
    '//elsewhere.example/',
    '/\\elsewhere.example',
    '/\t/elsewhere.example',
    'javascript:alert(1)',
  ])('is the start page for %j', (to) => {
    expect(ownPlace(to)).toBe('/');
  });
});
