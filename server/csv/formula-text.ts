/**
 * Text that a spreadsheet would run as a formula. Written out it gets an apostrophe in front, which spreadsheets
 * take as "this is text"; read back in, the apostrophe goes again. What is stored never has it.
 */

/** Begins like a formula and is no plain number. Apostrophes before it count, so that one more can be told apart. */
export const FORMULA_LIKE = /^(?![+-]?\d+(?:[.,]\d+)?$)'*[=+\-@\t\r]/;

const ESCAPED = /^'+[=+\-@\t\r]/;

export function withoutFormulaEscape(text: string): string {
  return text.charCodeAt(0) === APOSTROPHE && ESCAPED.test(text) ? text.slice(1) : text;
}

const APOSTROPHE = 0x27;
