import '@testing-library/jest-dom/vitest';
import { cleanup, configure } from '@testing-library/react';
import { afterEach, vi } from 'vitest';

/** The width that every element has in these tests, since jsdom lays nothing out. */
const WIDTH_PX = 1304;
const WIDE_SCREEN = '(min-width: 56.25rem)';

/** Pages are fetched when they are first opened; on a busy machine that takes its time. */
const PATIENCE_MS = 15_000;
configure({ asyncUtilTimeout: PATIENCE_MS });
vi.setConfig({ testTimeout: 4 * PATIENCE_MS });

let isWide = true;

/** Whether the screen that the pages see is a wide one; it is until a test says otherwise. */
export function setWideScreen(wide: boolean): void {
  isWide = wide;
}

class StillObserver {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
}

vi.stubGlobal('ResizeObserver', StillObserver);
vi.stubGlobal('scrollTo', () => {});
window.matchMedia = (media: string): MediaQueryList =>
  Object.assign(new EventTarget(), {
    media,
    matches: media === WIDE_SCREEN && isWide,
    onchange: null,
    addListener: () => {},
    removeListener: () => {},
  });
Element.prototype.getBoundingClientRect = () => new DOMRect(0, 0, isWide ? WIDTH_PX : 358, 20);
// jsdom has no DOMRect of its own.
if (!('DOMRect' in globalThis)) {
  vi.stubGlobal(
    'DOMRect',
    class {
      constructor(
        readonly x = 0,
        readonly y = 0,
        readonly width = 0,
        readonly height = 0,
      ) {}
      get left() {
        return this.x;
      }
      get top() {
        return this.y;
      }
      get right() {
        return this.x + this.width;
      }
      get bottom() {
        return this.y + this.height;
      }
    },
  );
}

afterEach(() => {
  cleanup();
  setWideScreen(true);
});
