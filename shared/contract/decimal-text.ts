/**
 * Numbers as people type them. A lone comma is the decimal mark, never a thousands mark; two marks are an
 * error rather than a guess. Empty text is "not given" (undefined), never zero.
 */
import { z } from 'zod';

const DECIMAL = /^[+\-\u2212]?(\d+([.,]\d*)?|[.,]\d+)$/;

/** Number in `text`, undefined when empty, null when it is not a plain decimal number. */
export function parseDecimal(text: string): number | undefined | null {
  const trimmed = text.trim();
  if (trimmed === '') return undefined;
  if (!DECIMAL.test(trimmed)) return null;
  const value = Number(trimmed.replace(',', '.').replace('\u2212', '-'));
  if (!Number.isFinite(value)) return null;
  return value === 0 ? 0 : value;
}

/**
 * To the billionth: far below any meaning (a millionth of a µm), and a number that passes through text and the
 * database without a changed digit.
 */
export function toNineDecimals(value: number): number {
  return Math.round(value * 1e9) / 1e9;
}

export interface DecimalLimits {
  /** How the field is called in messages, with unit: `Axial length (mm)`. */
  name: string;
  min: number;
  max: number;
}

/** Schema for a typed number that may be left empty. Output: number or undefined. */
export function optionalDecimalText({ name, min, max }: DecimalLimits) {
  return z.string().transform((text, context) => {
    const value = parseDecimal(text);
    if (value === null) {
      context.addIssue({ code: 'custom', message: `${name}: "${text.slice(0, 40)}" is not a number` });
      return z.NEVER;
    }
    if (value !== undefined && (value < min || value > max)) {
      context.addIssue({ code: 'custom', message: `${name} must lie between ${min} and ${max}` });
      return z.NEVER;
    }
    return value;
  });
}

/** Schema for a typed number that must be there. Output: number. */
export function decimalText(limits: DecimalLimits) {
  return optionalDecimalText(limits).transform((value, context) => {
    if (value !== undefined) return value;
    context.addIssue({ code: 'custom', message: `${limits.name} is missing` });
    return z.NEVER;
  });
}
