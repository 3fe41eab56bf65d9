/** How wide the window is for components; jsdom itself has no layout. */
import { act } from '@testing-library/react';

export function setWindowWidth(widthPx: number): void {
  act(() => {
    Object.defineProperty(document.documentElement, 'clientWidth', { value: widthPx, configurable: true });
    Object.defineProperty(document.documentElement, 'clientHeight', { value: 800, configurable: true });
    globalThis.dispatchEvent(new Event('resize'));
  });
}
