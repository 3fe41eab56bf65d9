/**
 * Keratometric dioptres and millimetres of radius. "K" always means index 1.3375, the trade's convention: it is a
 * way to write a radius, not the optical power of the cornea, which each formula takes with its own index.
 */
import type { CorneaRadii } from '../types';

/** (1.3375 - 1) * 1000: keratometric power times radius in mm. */
export const KERATOMETRIC_MM_D = 337.5;

/** Radius in mm from keratometric power in D. */
export function radiusMmFromKeratometryD(keratometryD: number): number {
  return KERATOMETRIC_MM_D / keratometryD;
}

/** Keratometric power in D from radius in mm. */
export function keratometryDFromRadiusMm(radiusMm: number): number {
  return KERATOMETRIC_MM_D / radiusMm;
}

/** Mean of the two powers: what all formulas but Haigis call K. */
export function meanKeratometryD(cornea: CorneaRadii): number {
  return (KERATOMETRIC_MM_D / cornea.flatRadiusMm + KERATOMETRIC_MM_D / cornea.steepRadiusMm) / 2;
}

/** Mean of the two radii: what Haigis calls RC. For 42/46 D it differs from the above by 0.12 D of lens power. */
export function meanRadiusMm(cornea: CorneaRadii): number {
  return (cornea.flatRadiusMm + cornea.steepRadiusMm) / 2;
}

/** Keratometric astigmatism, D; positive when the steep radius is the smaller one. */
export function keratometricCylinderD(cornea: CorneaRadii): number {
  return KERATOMETRIC_MM_D / cornea.steepRadiusMm - KERATOMETRIC_MM_D / cornea.flatRadiusMm;
}

/** Both principal radii shifted by the same keratometric power. */
export function shiftedCornea(cornea: CorneaRadii, byD: number): CorneaRadii {
  return {
    flatRadiusMm: KERATOMETRIC_MM_D / (KERATOMETRIC_MM_D / cornea.flatRadiusMm + byD),
    steepRadiusMm: KERATOMETRIC_MM_D / (KERATOMETRIC_MM_D / cornea.steepRadiusMm + byD),
  };
}
