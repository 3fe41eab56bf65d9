/**
 * Angles. An axis is a line, not a direction: 0 and 180 degrees are the same, and the trade writes 180.
 */
export function radFromDeg(deg: number): number {
  return (deg * Math.PI) / 180;
}

export function degFromRad(rad: number): number {
  return (rad * 180) / Math.PI;
}

/** The same axis in the half-open interval (0, 180]. */
export function normaliseAxisDeg(axisDeg: number): number {
  const rest = axisDeg % 180;
  const axis = rest > 0 ? rest : rest + 180;
  // A tiny negative rest rounds to 180 exactly; minus zero became 180 above.
  return axis > 180 ? 180 : axis;
}

/** A whole axis from 1 to 180, as it is written on a plan. */
export function roundAxisDeg(axisDeg: number): number {
  return normaliseAxisDeg(Math.round(normaliseAxisDeg(axisDeg)));
}

/** Smallest angle between two axes, 0 to 90. */
export function axisDifferenceDeg(firstDeg: number, secondDeg: number): number {
  const difference = normaliseAxisDeg(firstDeg - secondDeg);
  return difference > 90 ? 180 - difference : difference;
}
