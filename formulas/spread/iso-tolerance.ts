/**
 * Label tolerance — how far a lens may lie from its labelled power, as a standard deviation.
 *
 * Inputs: powerD, labelled power, D, either sign.
 * Result: D; half-width of the permitted band over the square root of 3 (uniform within it [D]).
 * Outside the valid range: defined for every power.
 * Source: ISO 11979-2, half-widths as quoted on a teaching page [V]: up to 15 D 0.3, to 25 D 0.4, to 30 D 0.5, above
 *   1.0 D.
 * Erratum / variant: the 2014 edition was withdrawn on 2024-10-31; the current one is to be checked.
 */
export function labelToleranceSdD(powerD: number): number {
  return halfWidthD(Math.abs(powerD)) / Math.sqrt(3);
}

function halfWidthD(sizeD: number): number {
  if (sizeD <= 15) return 0.3;
  if (sizeD <= 25) return 0.4;
  if (sizeD <= 30) return 0.5;
  return 1;
}
