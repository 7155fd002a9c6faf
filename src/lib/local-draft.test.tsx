import { act, renderHook } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { dropAllLocalDrafts, useLocalDraft } from './local-draft.ts';

const isText = (value: unknown): value is string => typeof value === 'string';
const open = () => renderHook(() => useLocalDraft('job', '', isText));

afterEach(() => vi.useRealTimers());

describe('a form half filled', () => {
  it('is still there after a reload', () => {
    vi.useFakeTimers();
    const first = open();
    expect(first.result.current).toMatchObject({ start: '', wasKept: false });
    act(() => first.result.current.keep('tailgate'));
    act(() => void vi.advanceTimersByTime(300));
    first.unmount();
    expect(open().result.current).toMatchObject({ start: 'tailgate', wasKept: true });
  });
  it('is kept at the last moment when the page is left', () => {
    const first = open();
    act(() => first.result.current.keep('bumper'));
    act(() => void window.dispatchEvent(new Event('pagehide')));
    expect(open().result.current.start).toBe('bumper');
  });
  it('is gone once it was sent, and on signing out', () => {
    const first = open();
    act(() => first.result.current.keep('bumper'));
    act(() => void window.dispatchEvent(new Event('pagehide')));
    act(() => first.result.current.drop());
    expect(open().result.current.wasKept).toBe(false);
    sessionStorage.setItem('ovenbird.draft.job', '"door"');
    dropAllLocalDrafts();
    expect(open().result.current.wasKept).toBe(false);
  });
  it('is left alone where it cannot be used', () => {
    sessionStorage.setItem('ovenbird.draft.job', '{"not":"text"}');
    expect(open().result.current).toMatchObject({ start: '', wasKept: false });
    sessionStorage.setItem('ovenbird.draft.job', 'broken');
    expect(open().result.current.start).toBe('');
  });
});
