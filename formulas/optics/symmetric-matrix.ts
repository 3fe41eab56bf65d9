/**
 * Symmetric 2x2 matrices: the vergence of an astigmatic wavefront. All operations here keep them symmetric, because
 * each is a function of one matrix or a sum.
 *
 * Matrix of (S, C, a):  [ S + C sin^2 a, -C sin a cos a ; -C sin a cos a, S + C cos^2 a ]  [D]
 */
import { degFromRad, normaliseAxisDeg, radFromDeg } from '../units/angle';

export interface SymmetricMatrix {
  xx: number;
  xy: number;
  yy: number;
}

export interface SphereCylinder {
  sphereD: number;
  cylinderD: number;
  axisDeg: number;
}

export function matrixFromSphereCylinder(lens: SphereCylinder): SymmetricMatrix {
  const axisRad = radFromDeg(lens.axisDeg);
  const sin = Math.sin(axisRad);
  const cos = Math.cos(axisRad);
  return {
    xx: lens.sphereD + lens.cylinderD * sin * sin,
    xy: -lens.cylinderD * sin * cos,
    yy: lens.sphereD + lens.cylinderD * cos * cos,
  };
}

/** In minus-cylinder form, axis in (0, 180]; a sphere gets axis 180. */
export function sphereCylinderFromMatrix(matrix: SymmetricMatrix): SphereCylinder {
  const meanD = (matrix.xx + matrix.yy) / 2;
  const j0D = (matrix.xx - matrix.yy) / 2;
  const j45D = matrix.xy;
  const halfCylinderD = Math.hypot(j0D, j45D);
  return {
    sphereD: meanD + halfCylinderD + 0,
    cylinderD: halfCylinderD === 0 ? 0 : -2 * halfCylinderD,
    axisDeg: halfCylinderD === 0 ? 180 : normaliseAxisDeg(degFromRad(Math.atan2(j45D, j0D)) / 2),
  };
}

export function scalarMatrix(valueD: number): SymmetricMatrix {
  return { xx: valueD, xy: 0, yy: valueD };
}

export function minus(first: SymmetricMatrix, second: SymmetricMatrix): SymmetricMatrix {
  return { xx: first.xx - second.xx, xy: first.xy - second.xy, yy: first.yy - second.yy };
}

/**
 * Vergence one reduced distance (m) upstream: V (1 + t V)^-1. Undefined where a focus lies on the way, in either
 * principal meridian: both eigenvalues of 1 + t V must be positive.
 */
export function steppedBack(vergence: SymmetricMatrix, reducedM: number): SymmetricMatrix | undefined {
  const xx = 1 + reducedM * vergence.xx;
  const xy = reducedM * vergence.xy;
  const yy = 1 + reducedM * vergence.yy;
  const determinant = xx * yy - xy * xy;
  if (!(determinant > 0 && xx + yy > 0)) return undefined;
  return {
    xx: (vergence.xx * yy - vergence.xy * xy) / determinant,
    xy: vergence.xy / determinant,
    yy: (vergence.yy * xx - vergence.xy * xy) / determinant,
  };
}
