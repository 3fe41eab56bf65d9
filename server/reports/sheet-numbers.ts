/** Numbers and dates on printed sheets: signs always, a true minus, no numeric months. */
const MINUS = '\u2212';
export const MISSING = '—';

export function signed(value: number | null, decimals: number): string {
  if (value === null) return MISSING;
  const text = Math.abs(value).toFixed(decimals);
  if (Number(text) === 0) return text;
  return (value < 0 ? MINUS : '+') + text;
}

export const plain = (value: number | null, decimals: number): string => value?.toFixed(decimals) ?? MISSING;
export const powerText = (powerD: number): string => signed(powerD, Number.isInteger(powerD * 2) ? 1 : 2);
export const axisText = (axisDeg: number | null): string =>
  axisDeg === null ? MISSING : `${Math.round(axisDeg) % 180 || 180}°`;

/** Never rounded to a certainty that is not there. */
export function chanceText(chance: number): string {
  if (chance > 0.99 && chance < 1) return '>99 %';
  if (chance > 0 && chance < 0.01) return '<1 %';
  return `${Math.round(chance * 100)} %`;
}

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
export const dateText = (iso: string): string =>
  `${iso.slice(8, 10)} ${MONTHS[Number(iso.slice(5, 7)) - 1]} ${iso.slice(0, 4)}`;
export const momentText = (iso: string): string => `${dateText(iso)}, ${iso.slice(11, 16)} UTC`;
