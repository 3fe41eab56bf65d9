/**
 * Astigmatism as a double-angle vector: X = m cos 2a, Y = m sin 2a, a the steep meridian. Vectors of this kind add.
 * Source: Thibos et al., Optom Vis Sci 1997;74:367-375 [V abstract].
 */
import { degFromRad, normaliseAxisDeg, radFromDeg } from '../units/angle';

export interface Astigmatism {
  /** Not negative. */
  cylinderD: number;
  /** In (0, 180]; 180 where there is no cylinder. */
  steepAxisDeg: number;
}

export interface AstigmatismVector {
  xD: number;
  yD: number;
}

export function vectorFromAstigmatism(astigmatism: Astigmatism): AstigmatismVector {
  const doubleRad = 2 * radFromDeg(astigmatism.steepAxisDeg);
  return {
    xD: astigmatism.cylinderD * Math.cos(doubleRad),
    yD: astigmatism.cylinderD * Math.sin(doubleRad),
  };
}

export function astigmatismFromVector(vector: AstigmatismVector): Astigmatism {
  const cylinderD = Math.hypot(vector.xD, vector.yD);
  if (cylinderD === 0) return { cylinderD: 0, steepAxisDeg: 180 };
  return { cylinderD, steepAxisDeg: normaliseAxisDeg(degFromRad(Math.atan2(vector.yD, vector.xD)) / 2) };
}

export function plus(first: AstigmatismVector, second: AstigmatismVector): AstigmatismVector {
  return { xD: first.xD + second.xD, yD: first.yD + second.yD };
}

/** What an incision does: it flattens its own meridian, so it steepens the one across. */
export function surgicallyInduced(siaD: number, incisionAxisDeg: number): AstigmatismVector {
  return vectorFromAstigmatism({ cylinderD: siaD, steepAxisDeg: incisionAxisDeg + 90 });
}
