/** Free text without a schema, for the many rows of a file; the same rules as `lineOf` and `textOf`. */

const CONTROL = /[\u0000-\u001f\u007f-\u009f]/;
const CONTROL_BUT_LINE_BREAK = /[\u0000-\u0008\u000b-\u001f\u007f-\u009f]/;

export interface TextRule {
  /** How the field is called in messages. */
  name: string;
  maxLength: number;
  /** Several lines are allowed. */
  isMultiline?: boolean;
}

/** What is wrong with the (trimmed) text; undefined when nothing is. */
export function textProblem(text: string, { name, maxLength, isMultiline }: TextRule): string | undefined {
  if (text.length > maxLength) return `${name} is longer than ${maxLength} characters`;
  const forbidden = isMultiline ? CONTROL_BUT_LINE_BREAK : CONTROL;
  return forbidden.test(text) ? `${name} contains control characters` : undefined;
}

/** A value as a message quotes it: never longer than a line, control characters shown as a box. */
export function quoted(text: string): string {
  const shown = text.length > 40 ? `${text.slice(0, 40)}…` : text;
  return `"${shown.replace(/[\u0000-\u001f\u007f-\u009f]/g, '\u25a1')}"`;
}
