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

/** Rows above and below the exact power; the chart shows this many on either side. */
const ROWS_EACH_SIDE = 4;

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
  const lowest = powers[0] ?? exactPowerD;
  const highest = powers.at(-1) ?? exactPowerD;
  const firstAbove = powers.findIndex((powerD) => powerD >= exactPowerD);
  const centre = firstAbove < 0 ? powers.length : firstAbove;
  const first = Math.max(centre - ROWS_EACH_SIDE, 0);
  const last = centre + ROWS_EACH_SIDE;
  const shown = powers.filter((powerD, index) => (index >= first && index < last) || powerD === chosenPowerD);
  const beyond = exactPowerD > highest ? 'above' : exactPowerD < lowest ? 'below' : null;
  return { powersD: shown.reverse(), beyond };
}
