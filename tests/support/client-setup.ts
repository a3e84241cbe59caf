import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach, expect, vi } from 'vitest';

/** What jsdom lacks and browsers have. */
window.matchMedia ??= (query: string) =>
  ({
    matches: false,
    media: query,
    onchange: null,
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
    addListener: () => undefined,
    removeListener: () => undefined,
    dispatchEvent: () => false,
  }) satisfies MediaQueryList;
globalThis.ResizeObserver ??= class {
  observe = () => undefined;
  unobserve = () => undefined;
  disconnect = () => undefined;
};
globalThis.CSS ??= {} as typeof CSS;
globalThis.CSS.escape ??= (text: string) => text.replace(/[^\w-]/g, (character) => `\\${character}`);
Element.prototype.scrollIntoView ??= () => undefined;

const told: string[] = [];

beforeEach(() => {
  told.length = 0;
  window.localStorage.clear();
  for (const method of ['error', 'warn'] as const)
    vi.spyOn(console, method).mockImplementation((...words: unknown[]) => {
      told.push(words.map(String).join(' '));
    });
});

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
  vi.restoreAllMocks();
  // What React or a library complains about is a fault of the page.
  expect(told).toEqual([]);
});
