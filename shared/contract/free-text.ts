/** Free text without a schema, for the many rows of a file; the same rules as `lineOf` and `textOf`. */

const CONTROL = /[\u0000-\u001f\u007f-\u009f]/;
const EVERY_CONTROL = /[\u0000-\u001f\u007f-\u009f]/g;
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

/** Foreign text as a line of a list or message: shortened, control characters shown as a box. */
export function shownText(text: string, maxLength = 100): string {
  const short = text.length > maxLength ? `${text.slice(0, maxLength)}…` : text;
  return CONTROL.test(short) ? short.replace(EVERY_CONTROL, '\u25a1') : short;
}

/** A value as a message quotes it. */
export function quoted(text: string): string {
  return `"${shownText(text, 40)}"`;
}
