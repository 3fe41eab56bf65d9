/** The powers in which a lens model is made, and those worth comparing for one eye. */
import type { PowerRange } from '@/shared/contract';

/** Rounds away what adding steps in binary leaves behind. */
const tidy = (powerD: number): number => Math.round(powerD * 1000) / 1000 + 0;

/** All powers of the model, rising, each once. */
export function availablePowers(ranges: readonly PowerRange[]): number[] {
  const powers = ranges.flatMap(({ fromD, toD, stepD }) =>
    Array.from({ length: Math.round((toD - fromD) / stepD) + 1 }, (_, index) => tidy(fromD + index * stepD)),
  );
  return [...new Set(powers)].sort((a, b) => a - b);
}

/** Powers this near to the exact one are worth a row … */
const REACH_D = 2.5;
/** … on either side at least so many where steps are coarse, and at most so many where they are fine. */
const ROWS_EACH_SIDE = { least: 4, most: 6 };

export interface PowerWindow {
  /** From higher to lower power. */
  powersD: number[];
  /** Set when the exact power lies outside of what the model is made in. */
  beyond: 'above' | 'below' | null;
}

export interface PowerQuestion {
  exactPowerD: number;
  ranges: readonly PowerRange[];
  /** A power chosen already: shown even where it is far from the exact one. */
  chosenPowerD: number | null;
}

/** The powers round the exact one, from higher to lower; at an end of the range, the ones nearest to it. */
export function powersAround({ exactPowerD, ranges, chosenPowerD }: PowerQuestion): PowerWindow {
  const powers = availablePowers(ranges);
  const above = powers.filter((powerD) => powerD > exactPowerD);
  const below = powers.filter((powerD) => powerD <= exactPowerD).reverse();
  const isNear = (powerD: number, index: number): boolean =>
    index < ROWS_EACH_SIDE.least ||
    (index < ROWS_EACH_SIDE.most && Math.abs(powerD - exactPowerD) <= REACH_D);
  const near = new Set([...above.filter(isNear), ...below.filter(isNear)]);
  const shown = powers.filter((powerD) => near.has(powerD) || powerD === chosenPowerD);
  return { powersD: shown.reverse(), beyond: beyondRange(exactPowerD, powers) };
}

function beyondRange(exactPowerD: number, powers: readonly number[]): PowerWindow['beyond'] {
  if (exactPowerD > (powers.at(-1) ?? exactPowerD)) return 'above';
  return exactPowerD < (powers[0] ?? exactPowerD) ? 'below' : null;
}
