/**
 * How numbers and dates are written, everywhere. A missing number is a dash, never 0; minus is a true minus.
 */
export const MISSING = '—';
const MINUS = '\u2212';

type Maybe = number | null | undefined;

function fixed(value: Maybe, decimals: number, withPlus: boolean): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return MISSING;
  const text = Math.abs(value).toFixed(decimals);
  const isZero = Number(text) === 0;
  if (isZero) return text;
  return (value < 0 ? MINUS : withPlus ? '+' : '') + text;
}

/** Refraction, target, cylinder: sign and two decimals. `−0.25` */
export const formatDioptres = (valueD: Maybe): string => fixed(valueD, 2, true);

/** Lens power: sign always, decimals of the model's step but at least one. `+21.5` */
export function formatPower(powerD: Maybe, stepD = 0.5): string {
  const decimals = Math.abs(stepD * 10 - Math.round(stepD * 10)) < 1e-9 ? 1 : 2;
  return fixed(powerD, decimals, true);
}

/** Keratometry in dioptres: two decimals, no sign. */
export const formatKeratometry = (valueD: Maybe): string => fixed(valueD, 2, false);

/** Lengths in mm: two decimals. */
export const formatMm = (valueMm: Maybe): string => fixed(valueMm, 2, false);

/** Whole micrometres and other whole numbers. */
export const formatWhole = (value: Maybe): string => fixed(value, 0, false);

/** Any number with the decimals it needs. */
export const formatDecimals = (value: Maybe, decimals: number): string => fixed(value, decimals, false);

/** Axis as whole degrees 1–180; 0 is written 180. */
export function formatAxis(axisDeg: Maybe): string {
  if (axisDeg === null || axisDeg === undefined || !Number.isFinite(axisDeg)) return MISSING;
  const whole = ((Math.round(axisDeg) % 180) + 180) % 180;
  return `${whole === 0 ? 180 : whole}°`;
}

/** Probability 0..1 as a whole percentage; never rounded up to a certainty that is not there. */
export function formatChance(chance: Maybe): string {
  if (chance === null || chance === undefined || !Number.isFinite(chance)) return MISSING;
  if (chance > 0.99 && chance < 1) return '>99 %';
  if (chance > 0 && chance < 0.01) return '<1 %';
  return `${Math.round(chance * 100)} %`;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** `2026-12-01` → `01 Dec 2026`: no numeric month to be misread. */
export function formatDate(isoDate: string | null | undefined): string {
  const match = /^(\d{4})-(\d{2})-(\d{2})/.exec(isoDate ?? '');
  const month = MONTHS[Number(match?.[2]) - 1];
  return match && month ? `${match[3]} ${month} ${match[1]}` : MISSING;
}

/** A moment in the reader's own time zone: `01 Dec 2026, 14:05`. */
export function formatInstant(isoInstant: string | null | undefined): string {
  const moment = new Date(isoInstant ?? Number.NaN);
  if (Number.isNaN(moment.getTime())) return MISSING;
  const two = (n: number) => String(n).padStart(2, '0');
  const day = `${two(moment.getDate())} ${MONTHS[moment.getMonth()]} ${moment.getFullYear()}`;
  return `${day}, ${two(moment.getHours())}:${two(moment.getMinutes())}`;
}

/** `2.4 MB` */
export function formatBytes(bytes: number): string {
  if (bytes < 1024) return `${bytes} B`;
  if (bytes < 1024 * 1024) return `${Math.round(bytes / 1024)} kB`;
  return `${(bytes / 1024 / 1024).toFixed(1)} MB`;
}

/** `3 eyes`, `1 eye` */
export function formatCount(count: number, singular: string, plural = `${singular}s`): string {
  return `${count.toLocaleString('en-GB')} ${count === 1 ? singular : plural}`;
}

/** `right` → `Right eye`. Sides are words, never colours or initials alone. */
export const sideWords = (side: 'right' | 'left'): string => (side === 'right' ? 'Right eye' : 'Left eye');
