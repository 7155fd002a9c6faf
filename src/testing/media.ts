import { vi } from 'vitest';

/** Answers media queries about the width as a window that wide would; jsdom has no layout to ask. */
export function stubWidth(pixels: number): void {
  vi.stubGlobal('matchMedia', (query: string) => {
    const [, side, rem] = /\((max|min)-width: ([\d.]+)rem\)/.exec(query) ?? [];
    const limit = Number(rem) * 16;
    const matches = side === 'max' ? pixels <= limit : side === 'min' ? pixels >= limit : false;
    return { matches, media: query, addEventListener: () => {}, removeEventListener: () => {} };
  });
}
