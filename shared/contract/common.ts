/**
 * Pieces shared by the nouns: ids, sides, dates, versions, pages.
 */
import { z } from 'zod';

export const idSchema = z.uuid();
export const SIDES = ['right', 'left'] as const;
export const sideSchema = z.enum(SIDES);
export type Side = z.infer<typeof sideSchema>;

/** Calendar date, ISO 8601 `YYYY-MM-DD`, that exists in the calendar. */
export const isoDateSchema = z.iso.date('Write the date as YYYY-MM-DD');
/** Moment in UTC, ISO 8601 with `Z`. */
export const isoInstantSchema = z.iso.datetime();

/** Optimistic lock: goes out as the strong ETag, comes back as If-Match. */
export const versionSchema = z.number().int().nonnegative();

export const PAGE_LIMIT_DEFAULT = 50;
export const PAGE_LIMIT_MAX = 200;

/** Keyset page: `next` is opaque; absent on the last page. */
export function pageOf<T extends z.ZodType>(item: T) {
  return z.object({ items: z.array(item), next: z.string().optional(), total: z.number().int().optional() });
}
export interface Page<T> {
  items: T[];
  next?: string;
  /** Given where counting is cheap. */
  total?: number;
}

export const pageQuerySchema = z.object({
  limit: z
    .string()
    .regex(/^\d{1,3}$/, 'A whole number up to 200')
    .transform(Number)
    .pipe(z.number().min(1).max(PAGE_LIMIT_MAX))
    .optional(),
  after: z.string().max(400).optional(),
});

/** One line of printable text: no control characters (NUL among them), trimmed, length-limited. */
export function lineOf(maxLength: number, name = 'This') {
  return z
    .string()
    .trim()
    .max(maxLength, `${name} is longer than ${maxLength} characters`)

    .refine((text) => !/[\u0000-\u001f\u007f-\u009f]/.test(text), `${name} contains control characters`);
}
/** As {@link lineOf}, and not empty. */
export function requiredLineOf(maxLength: number, name = 'This') {
  return lineOf(maxLength, name).min(1, `${name} is missing`);
}

/** Several lines of text: line breaks allowed, no other control characters. */
export function textOf(maxLength: number, name = 'This') {
  return z
    .string()
    .trim()
    .max(maxLength, `${name} is longer than ${maxLength} characters`)

    .refine(
      (text) => !/[\u0000-\u0008\u000b-\u001f\u007f-\u009f]/.test(text),
      `${name} contains control characters`,
    );
}
