/** Keys that work everywhere outside a field: `/` reaches the search, `?` lists the keys. */
import { useEffect } from 'react';
import { focusSearchField } from '@/shared/client/lib/search-focus';

const TYPING_IN = 'input, textarea, select, [contenteditable="true"], [role="dialog"]';

export function useShellKeys(onShowKeys: () => void): void {
  useEffect(() => {
    if (typeof document === 'undefined') return undefined;
    const onKeyDown = (event: KeyboardEvent) => {
      const target = event.target as Element | null;
      if (event.ctrlKey || event.metaKey || event.altKey || target?.closest(TYPING_IN)) return;
      if (event.key === '?') onShowKeys();
      else if (event.key === '/' && focusSearchField()) event.preventDefault();
    };
    document.addEventListener('keydown', onKeyDown);
    return () => document.removeEventListener('keydown', onKeyDown);
  });
}
