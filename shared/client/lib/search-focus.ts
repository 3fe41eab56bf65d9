/** The search field of the screen in view, so that the key "/" can reach it. */
interface Focusable {
  focus: () => void;
}

let field: Focusable | null = null;

export function searchFieldRef(element: Focusable | null): void {
  field = element;
}

/** True when there was a field to focus. */
export function focusSearchField(): boolean {
  field?.focus();
  return field !== null;
}
