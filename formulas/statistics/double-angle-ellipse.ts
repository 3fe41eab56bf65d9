/**
 * Double-angle centroid and ellipse — the mean of astigmatisms as vectors, and where eyes and mean lie.
 *
 * Inputs: vectors, D, in the double-angle plane (X = m cos 2a, Y = m sin 2a); confidence, 0.95 when absent.
 * Result: centroid as vector and as magnitude at an axis; ellipse with centre, half axes in D and the direction of its
 *   long axis in degrees of the double-angle plane, 0 to below 180. Of the eyes: where the next eye falls with this
 *   confidence. Of the centroid: where the true mean lies.
 * Outside the valid range: throws TooFewValuesError without vectors, below three for an ellipse.
 * Source: Hotelling, Ann Math Stat 1931;2:360-378 [M]; Holladay, Wilcox, Koch, Wang, J Cataract Refract Surg 2022 [V
 *   abstract] asks for double-angle plot and centroid; vectors: Thibos et al., Optom Vis Sci 1997;74:367-375 [V abstract].
 * Erratum / variant: exact for normal vectors, by F with 2 and n - 2 degrees of freedom; many programs draw the eyes'
 *   ellipse by chi-square, which is too small for few eyes. Where the vectors are not normal the 2022 paper asks for a
 *   convex polygon, which is not computed here.
 */
import { astigmatismFromVector } from '../toric/astigmatism';
import { degFromRad } from '../units/angle';
import { checkPairs, checkShare, checkValues } from './checks';
import { fQuantile } from './f-and-chi-square';
import { mean } from './mean-and-deviation';
import type { Astigmatism, AstigmatismVector } from '../toric/astigmatism';

export interface Ellipse {
  centre: AstigmatismVector;
  longHalfAxisD: number;
  shortHalfAxisD: number;
  /** Of the long axis against X, in the double-angle plane, degrees from 0 to below 180. */
  directionDeg: number;
}

export type EllipseOf = 'eyes' | 'centroid';

export function centroidOf(vectors: readonly AstigmatismVector[]): AstigmatismVector & Astigmatism {
  const centre = meanVector(vectors);
  return { ...centre, ...astigmatismFromVector(centre) };
}

export function doubleAngleEllipse(
  vectors: readonly AstigmatismVector[],
  of: EllipseOf,
  confidence = 0.95,
): Ellipse {
  checkShare('confidence', confidence);
  const count = vectors.length;
  const { xx, xy, yy } = scatterOf(vectors);
  // T² = 2 (n - 1)/(n - 2) F(2, n - 2), over n for the mean, times 1 + 1/n for the next eye.
  const f = fQuantile(confidence, { numerator: 2, denominator: count - 2 });
  const square = ((2 * (count - 1)) / (count - 2)) * f * (of === 'eyes' ? 1 + 1 / count : 1 / count);
  const middle = (xx + yy) / 2;
  const reach = Math.hypot((xx - yy) / 2, xy);
  const directionDeg = degFromRad(Math.atan2(2 * xy, xx - yy)) / 2;
  return {
    centre: meanVector(vectors),
    longHalfAxisD: Math.sqrt(square * (middle + reach)),
    shortHalfAxisD: Math.sqrt(square * Math.max(0, middle - reach)),
    directionDeg: (directionDeg < 0 ? directionDeg + 180 : directionDeg) % 180,
  };
}

function meanVector(vectors: readonly AstigmatismVector[]): AstigmatismVector {
  return { xD: mean(vectors.map(({ xD }) => xD)), yD: mean(vectors.map(({ yD }) => yD)) };
}

/** Sample covariance matrix. */
function scatterOf(vectors: readonly AstigmatismVector[]): { xx: number; xy: number; yy: number } {
  const [x, y] = [vectors.map(({ xD }) => xD), vectors.map(({ yD }) => yD)];
  checkValues('ellipse', x, 3);
  checkValues('ellipse', y, 3);
  return { xx: covariance(x, x), xy: covariance(x, y), yy: covariance(y, y) };
}

function covariance(first: readonly number[], second: readonly number[]): number {
  checkPairs('covariance', first, second);
  const [centreOfFirst, centreOfSecond] = [mean(first), mean(second)];
  const products = first.map(
    (value, index) => (value - centreOfFirst) * ((second[index] ?? NaN) - centreOfSecond),
  );
  return products.reduce((sum, product) => sum + product, 0) / (first.length - 1);
}
