/** Whether the person asked their system for less movement. */
import { useSyncExternalStore } from 'react';

const QUERY = '(prefers-reduced-motion: reduce)';
const media = () => globalThis.matchMedia?.(QUERY);

export function useReducedMotion(): boolean {
  return useSyncExternalStore(
    (onChange) => {
      const list = media();
      list?.addEventListener('change', onChange);
      return () => list?.removeEventListener('change', onChange);
    },
    () => media()?.matches ?? false,
  );
}
