/** The search field of the screen in view, so that the key "/" can reach it. */
import type { TextInput } from 'react-native';

let field: TextInput | null = null;

export function searchFieldRef(element: TextInput | null): void {
  field = element;
}

/** True when there was a field to focus. */
export function focusSearchField(): boolean {
  field?.focus();
  return field !== null;
}
