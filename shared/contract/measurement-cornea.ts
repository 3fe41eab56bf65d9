/**
 * The cornea of a measurement: radii in mm are the ground truth. A power in dioptres means a radius only
 * together with its keratometric index; where both are given they must tell the same story.
 */
import { axisDifferenceDeg } from '@/formulas';
import { toNineDecimals } from './decimal-text';
import type { MeasurementValues } from './measurement';

export type CorneaField =
  | 'flatKD'
  | 'steepKD'
  | 'keratometricIndex'
  | 'flatRadiusMm'
  | 'steepRadiusMm'
  | 'flatAxisDeg'
  | 'steepAxisDeg';

/** As read from the text; null where nothing was given. */
export type GivenCornea = Record<CorneaField, number | null>;
export type Cornea = Pick<MeasurementValues, CorneaField>;
export type Refuse = (field: CorneaField, message: string) => void;

interface Meridian {
  name: 'Flat' | 'Steep';
  power: 'flatKD' | 'steepKD';
  radius: 'flatRadiusMm' | 'steepRadiusMm';
}
const MERIDIANS: readonly Meridian[] = [
  { name: 'Flat', power: 'flatKD', radius: 'flatRadiusMm' },
  { name: 'Steep', power: 'steepKD', radius: 'steepRadiusMm' },
];

/** Power and radius of one meridian may differ by rounding, not by more (common practice). */
export const POWER_RADIUS_AGREEMENT_D = 0.25;
/** Axes of the two principal meridians stand 90° apart; devices round each by itself (common practice). */
export const PERPENDICULAR_WITHIN_DEG = 5;
/** Beyond this no cornea is meant (clinical plausibility, common practice). */
export const CYLINDER_MAX_D = 15;
export const RADIUS_LIMITS_MM = { min: 4.5, max: 13.5 } as const;
export const INDEX_LIMITS = { min: 1.3, max: 1.4 } as const;
const ROUNDING = 1e-9;

/** Checks the cornea and completes its radii; null when something was refused. */
export function readCornea(given: GivenCornea, refuse: Refuse): Cornea | null {
  let isRefused = false;
  const note: Refuse = (field, message) => {
    isRefused = true;
    refuse(field, message);
  };
  checkPairs(given, note);
  if (isRefused) return null;
  checkOrder(given, note);
  checkAxes(given, note);
  if (given.flatRadiusMm !== null) checkAgreement(given, note);
  const cornea = withRadii(given);
  if (!isRefused) checkRadii(cornea, note);
  return isRefused ? null : cornea;
}

/** Powers come in pairs, radii come in pairs, and powers alone need their index. */
function checkPairs(given: GivenCornea, refuse: Refuse): void {
  const [flat, steep] = MERIDIANS as [Meridian, Meridian];
  for (const [kind, what] of [
    ['power', 'keratometry'],
    ['radius', 'radius'],
  ] as const) {
    if ((given[flat[kind]] === null) === (given[steep[kind]] === null)) continue;
    const missing = given[flat[kind]] === null ? flat : steep;
    refuse(missing[kind], `${missing.name} ${what} is missing: give both meridians`);
  }
  if (given.flatRadiusMm !== null || given.steepRadiusMm !== null) return;
  if (given.flatKD === null && given.steepKD === null) {
    refuse('flatKD', 'Keratometry is missing: give powers with their index, or radii');
  } else if (given.keratometricIndex === null) {
    refuse(
      'keratometricIndex',
      'Keratometric index is missing: without it a power in dioptres is no radius (1.3375 is usual, see the device); or give radii',
    );
  }
}

function checkOrder(given: GivenCornea, refuse: Refuse): void {
  const { flatKD, steepKD, flatRadiusMm, steepRadiusMm } = given;
  if (flatKD !== null && steepKD !== null && flatKD > steepKD) {
    refuse('flatKD', `Flat keratometry ${flatKD} D is steeper than steep ${steepKD} D: are the two swapped?`);
  }
  if (flatRadiusMm !== null && steepRadiusMm !== null && flatRadiusMm < steepRadiusMm) {
    refuse(
      'flatRadiusMm',
      `Flat radius ${flatRadiusMm} mm is smaller than steep ${steepRadiusMm} mm: are the two swapped?`,
    );
  }
}

function checkAxes({ flatAxisDeg, steepAxisDeg }: GivenCornea, refuse: Refuse): void {
  if (flatAxisDeg === null || steepAxisDeg === null) return;
  const apartDeg = axisDifferenceDeg(flatAxisDeg, steepAxisDeg);
  if (apartDeg >= 90 - PERPENDICULAR_WITHIN_DEG - ROUNDING) return;
  const hint =
    apartDeg <= PERPENDICULAR_WITHIN_DEG
      ? 'is one axis written in both places?'
      : 'is one of them mistyped, or from another measurement?';
  refuse(
    'steepAxisDeg',
    `Flat axis ${flatAxisDeg}° and steep axis ${steepAxisDeg}° are ${rounded(apartDeg)}° apart and should be 90°: ${hint}`,
  );
}

/** With an index: each power must match its radius. Without: some index must explain both meridians. */
function checkAgreement(given: GivenCornea, refuse: Refuse): void {
  if (given.flatKD === null) return;
  if (given.keratometricIndex === null) return checkSomeIndex(given, refuse);
  for (const { name, power, radius } of MERIDIANS) {
    const [powerD, radiusMm] = [given[power] ?? 0, given[radius] ?? 1];
    const fromRadiusD = dioptresTimesMm(given.keratometricIndex) / radiusMm;
    const differenceD = Math.abs(powerD - fromRadiusD);
    if (differenceD <= POWER_RADIUS_AGREEMENT_D + ROUNDING) continue;
    refuse(
      power,
      `${name} keratometry ${powerD} D and ${name.toLowerCase()} radius ${radiusMm} mm disagree by ${differenceD.toFixed(2)} D at index ${given.keratometricIndex}`,
    );
  }
}

function checkSomeIndex(given: GivenCornea, refuse: Refuse): void {
  let { min, max }: { min: number; max: number } = INDEX_LIMITS;
  for (const { power, radius } of MERIDIANS) {
    const [powerD, radiusMm] = [given[power] ?? 0, given[radius] ?? 1];
    min = Math.max(min, 1 + ((powerD - POWER_RADIUS_AGREEMENT_D) * radiusMm) / 1000);
    max = Math.min(max, 1 + ((powerD + POWER_RADIUS_AGREEMENT_D) * radiusMm) / 1000);
  }
  if (min <= max + ROUNDING) return;
  refuse('keratometricIndex', 'Powers and radii do not belong together at any keratometric index');
}

function withRadii(given: GivenCornea): Cornea {
  const { flatKD, steepKD, keratometricIndex, flatRadiusMm, steepRadiusMm } = given;
  const scale = keratometricIndex === null ? 0 : dioptresTimesMm(keratometricIndex);
  return {
    ...given,
    flatRadiusMm: flatRadiusMm ?? toNineDecimals(scale / (flatKD ?? 1)),
    steepRadiusMm: steepRadiusMm ?? toNineDecimals(scale / (steepKD ?? 1)),
    flatAxisDeg: storedAxis(given.flatAxisDeg),
    steepAxisDeg: storedAxis(given.steepAxisDeg),
  };
}

/** Power times radius. Rounded so that index 1.3375 gives 337.5 and not its floating-point neighbour. */
function dioptresTimesMm(keratometricIndex: number): number {
  return Math.round((keratometricIndex - 1) * 1e12) / 1e9;
}

function checkRadii(cornea: Cornea, refuse: Refuse): void {
  for (const { name, power, radius } of MERIDIANS) {
    const radiusMm = cornea[radius];
    if (radiusMm >= RADIUS_LIMITS_MM.min - ROUNDING && radiusMm <= RADIUS_LIMITS_MM.max + ROUNDING) continue;
    refuse(
      power,
      `${name} keratometry ${cornea[power]} D at index ${cornea.keratometricIndex} is a radius of ${radiusMm.toFixed(2)} mm, outside ${RADIUS_LIMITS_MM.min} to ${RADIUS_LIMITS_MM.max} mm`,
    );
  }
  const cylinderD = 337.5 / cornea.steepRadiusMm - 337.5 / cornea.flatRadiusMm;
  if (cylinderD <= CYLINDER_MAX_D) return;
  refuse(
    cornea.steepKD === null ? 'steepRadiusMm' : 'steepKD',
    `Flat and steep differ by ${cylinderD.toFixed(2)} D: more than ${CYLINDER_MAX_D} D is no cornea, one of them is mistyped`,
  );
}

/** 0° and 180° are one axis, written 180. */
function storedAxis(axisDeg: number | null): number | null {
  return axisDeg === 0 ? 180 : axisDeg;
}

function rounded(value: number): number {
  return Math.round(value * 10) / 10;
}
