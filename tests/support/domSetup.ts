import '@testing-library/jest-dom/vitest';
import { cleanup } from '@testing-library/react';
import { afterEach } from 'vitest';

afterEach(cleanup);

/** What jsdom lacks and the layers of the kit ask for. */
class StillObserver implements ResizeObserver {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
}
Object.assign(globalThis, { ResizeObserver: StillObserver });
Object.assign(Element.prototype, {
  hasPointerCapture: () => false,
  scrollIntoView: () => undefined,
});
Object.assign(HTMLCanvasElement.prototype, { getContext: () => null });
Object.assign(window, {
  matchMedia: (query: string) => Object.assign(new EventTarget(), { matches: false, media: query }),
});
