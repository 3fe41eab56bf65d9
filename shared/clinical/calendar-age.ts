/** Ages in whole months and years between ISO dates. */

/** Months that are complete on `to`; the day after the anniversary counts as more than full months. */
export function monthsBetween(from: string, to: string): { whole: number; isPast: boolean } {
  const [start, end] = [partsOf(from), partsOf(to)];
  const months = (end.year - start.year) * 12 + end.month - start.month;
  return { whole: end.day < start.day ? months - 1 : months, isPast: end.day !== start.day };
}

/** True when `to` lies after the day on which `from` is that many months old. */
export function isOlderThanMonths(from: string, to: string, months: number): boolean {
  const { whole, isPast } = monthsBetween(from, to);
  return whole > months || (whole === months && isPast);
}

export const yearsBetween = (from: string, to: string): number =>
  Math.floor(monthsBetween(from, to).whole / 12);

function partsOf(iso: string): { year: number; month: number; day: number } {
  const [year = NaN, month = NaN, day = NaN] = iso.split('-').map(Number);
  return { year, month, day };
}
