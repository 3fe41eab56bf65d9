/** Numbers inside of sentences: signs always, a true minus. */
const MINUS = '\u2212';

export function signedD(valueD: number, decimals = 2): string {
  const text = Math.abs(valueD).toFixed(decimals);
  if (Number(text) === 0) return text;
  return (valueD < 0 ? MINUS : '+') + text;
}

/** A whole percentage that is never rounded to a certainty which is not there. */
export function chancePercent(chance: number): string {
  if (chance > 0.99 && chance < 1) return '>99';
  if (chance > 0 && chance < 0.01) return '<1';
  return String(Math.round(chance * 100));
}

/** Lens power with the decimals of its step, and at least one. */
export const powerWords = (powerD: number): string => signedD(powerD, Number.isInteger(powerD * 2) ? 1 : 2);
