/**
 * Vertex distance: one refraction at the spectacle plane and at the cornea.
 * Both directions keep the sign of the denominator: past the pole the far point lies between spectacle lens and
 * cornea and the formula would answer with the wrong sign, so they throw instead.
 */
import { OutOfRangeError } from '../errors';

export const DEFAULT_VERTEX_MM = 12;

/** Refraction at the corneal plane, D, from refraction at the spectacle plane, D. */
export function cornealFromSpectacleD(refractionD: number, vertexMm: number): number {
  const denominator = 1 - 0.001 * vertexMm * refractionD;
  if (!(denominator > 0)) {
    throw new OutOfRangeError('refractionD', refractionD, { min: -Number.MAX_VALUE, max: 1000 / vertexMm });
  }
  return refractionD / denominator;
}

/** Refraction at the spectacle plane, D, from refraction at the corneal plane, D. */
export function spectacleFromCornealD(cornealRefractionD: number, vertexMm: number): number {
  const denominator = 1 + 0.001 * vertexMm * cornealRefractionD;
  if (!(denominator > 0)) {
    throw new OutOfRangeError('cornealRefractionD', cornealRefractionD, {
      min: -1000 / vertexMm,
      max: Number.MAX_VALUE,
    });
  }
  return cornealRefractionD / denominator;
}
