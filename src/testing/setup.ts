import '@testing-library/jest-dom/vitest';
import { cleanup, configure } from '@testing-library/react';
import { afterEach } from 'vitest';

// Against hanging, not against slowness: a busy machine fails no test.
configure({ asyncUtilTimeout: 30_000 });

afterEach(() => {
  cleanup();
  sessionStorage.clear();
  localStorage.clear();
});

// What jsdom lacks and the pages ask for.
globalThis.matchMedia ??= (query: string) =>
  Object.assign(new EventTarget(), {
    matches: false,
    media: query,
    onchange: null,
    addListener: () => {},
    removeListener: () => {},
  }) as MediaQueryList;
globalThis.ResizeObserver ??= class {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
};
Element.prototype.scrollIntoView ??= () => {};
Element.prototype.hasPointerCapture ??= () => false;
Element.prototype.setPointerCapture ??= () => {};
Element.prototype.releasePointerCapture ??= () => {};

// jsdom lays nothing out and so scrolls nothing.
Element.prototype.scrollTo = () => undefined;
Element.prototype.scrollBy = () => undefined;
