/**
 * Toric plan — cylinder and axis that would correct the cornea fully, and what a given lens leaves.
 *
 * Inputs: eye and constants as for the formula; steep and incision axes, degrees 0 to 180; siaD, D, 0 to 5, the
 *   centroid of the surgeon's induced astigmatism, not its mean size; lens: powerD is its spherical equivalent,
 *   cylinderD at the lens plane, axisDeg the meridian that its marks point to (its weak meridian).
 * Result: D and degrees. The cornea after incision and posterior cornea, in keratometric D; the full cylinder at the
 *   lens plane; the residual spectacle refraction in minus-cylinder form, axis in (0, 180].
 * Outside the valid range: throws OutOfRangeError naming the input. Never clamps.
 * Source: derived from the thin-lens core with 2x2 vergence matrices [D]; double-angle vectors, Thibos et al.,
 *   Optom Vis Sci 1997;74:367-375 [V abstract].
 * Erratum / variant: one lens position, from the mean K, serves both meridians. The ratio of lens plane to cornea is
 *   computed for the eye (1.29 to 1.70 over the range), not the fixed 1.46 in circulation. The cylinder for full
 *   correction is taken at emmetropia. Rotation off the ideal axis is in the residual by itself.
 */
import { OutOfRangeError } from '../errors';
import { checkRange, hardLimits } from '../limits';
import {
  matrixFromSphereCylinder,
  minus,
  scalarMatrix,
  sphereCylinderFromMatrix,
  steppedBack,
} from '../optics/symmetric-matrix';
import { AQUEOUS_MM_D, powerWithRefraction, thinLens } from '../optics/thin-lens';
import { checkRequest, opticsOf, vertexOf } from '../predict/request';
import { keratometricCylinderD } from '../units/corneal-power';
import { finite } from '../units/number';
import { astigmatismFromVector, plus, surgicallyInduced, vectorFromAstigmatism } from './astigmatism';
import { withPosteriorCornea } from './posterior-cornea';
import type { SphereCylinder } from '../optics/symmetric-matrix';
import type { ThinLensEye } from '../optics/thin-lens';
import type {
  EyeGeometry,
  FormulaId,
  FormulaOptions,
  LensConstants,
  Notice,
  PosteriorCornea,
} from '../types';
import type { Astigmatism } from './astigmatism';

export interface ToricLens {
  /** Spherical equivalent. */
  powerD: number;
  /** At the lens plane, not negative. */
  cylinderD: number;
  /** The meridian that the marks point to. */
  axisDeg: number;
}

export interface ToricQuestion {
  formula: FormulaId;
  eye: EyeGeometry;
  steepAxisDeg: number;
  constants: LensConstants;
  siaD: number;
  incisionAxisDeg: number;
  posteriorCornea: PosteriorCornea;
  lens: ToricLens;
  options?: FormulaOptions;
}

export interface ToricPlan {
  /** After the incision and the posterior cornea. */
  cornealCylinderD: number;
  steepAxisDeg: number;
  /** Cylinder at the lens plane that corrects it fully. */
  fullCorrectionCylinderD: number;
  /** Where the marks belong: the steep meridian. */
  idealAxisDeg: number;
  /** Lens-plane D per corneal D. */
  planeRatio: number;
  residual: SphereCylinder;
  notices: Notice[];
}

export function planToric(question: ToricQuestion): ToricPlan {
  checkToric(question);
  const request = { ...question, options: question.options ?? {} };
  checkRequest(request);
  const optics = opticsOf(request);
  const { astigmatism, notices } = astigmatismAfterSurgery(question);
  const plane = lensPlaneCylinder(optics, astigmatism.cylinderD, vertexOf(request));
  return {
    cornealCylinderD: finite('cornealCylinderD', astigmatism.cylinderD),
    steepAxisDeg: astigmatism.steepAxisDeg,
    fullCorrectionCylinderD: finite('fullCorrectionCylinderD', plane.cylinderD),
    idealAxisDeg: astigmatism.steepAxisDeg,
    planeRatio: finite('planeRatio', plane.ratio),
    residual: residualRefraction(optics, { astigmatism, lens: question.lens, vertexMm: vertexOf(request) }),
    notices: [...optics.notices, ...notices],
  };
}

function checkToric({ eye, lens, ...question }: ToricQuestion): void {
  checkRange('steepAxisDeg', question.steepAxisDeg, hardLimits.axisDeg);
  checkRange('incisionAxisDeg', question.incisionAxisDeg, hardLimits.axisDeg);
  checkRange('siaD', question.siaD, hardLimits.siaD);
  checkRange('lens.powerD', lens.powerD, hardLimits.powerD);
  checkRange('lens.cylinderD', lens.cylinderD, hardLimits.cylinderD);
  checkRange('lens.axisDeg', lens.axisDeg, hardLimits.axisDeg);
  // Exchanged radii would turn the axis by 90 degrees.
  if (eye.steepRadiusMm > eye.flatRadiusMm) {
    const range = { min: hardLimits.radiusMm.min, max: eye.flatRadiusMm };
    throw new OutOfRangeError('steepRadiusMm', eye.steepRadiusMm, range);
  }
}

/** Keratometry plus what the incision adds, then the posterior cornea: the order of the published regressions. */
function astigmatismAfterSurgery(question: ToricQuestion) {
  const measured = vectorFromAstigmatism({
    cylinderD: keratometricCylinderD(question.eye),
    steepAxisDeg: question.steepAxisDeg,
  });
  const anterior = astigmatismFromVector(
    plus(measured, surgicallyInduced(question.siaD, question.incisionAxisDeg)),
  );
  return withPosteriorCornea(anterior, question.posteriorCornea, question.lens.cylinderD);
}

/** T = P(flat meridian) - P(steep meridian) at emmetropia; the ratio has a limit where there is no cylinder. */
function lensPlaneCylinder(optics: ThinLensEye, cornealCylinderD: number, vertexMm: number) {
  const halfD = (optics.indexRatio * cornealCylinderD) / 2;
  const flat = { ...optics, cornealPowerD: optics.cornealPowerD - halfD };
  const steep = { ...optics, cornealPowerD: optics.cornealPowerD + halfD };
  const cylinderD =
    powerWithRefraction(thinLens(flat, vertexMm), 0) - powerWithRefraction(thinLens(steep, vertexMm), 0);
  // Below this the quotient of two differences is noise; the limit is exact to its square.
  if (cornealCylinderD < 1e-4) return { cylinderD, ratio: localPlaneRatio(optics) };
  return { cylinderD, ratio: cylinderD / cornealCylinderD };
}

/** dP/dK = ratio of the indices / (1 - d Kc/1336)^2. */
function localPlaneRatio(optics: ThinLensEye): number {
  return optics.indexRatio / (1 - (optics.lensPlaneMm * optics.cornealPowerD) / AQUEOUS_MM_D) ** 2;
}

interface ResidualQuestion {
  astigmatism: Astigmatism;
  lens: ToricLens;
  vertexMm: number;
}

/** From the retina forwards: subtract the lens, step to the cornea, subtract it, step to the spectacle plane. */
function residualRefraction(optics: ThinLensEye, question: ResidualQuestion): SphereCylinder {
  const { lens, vertexMm } = question;
  const behindLens = scalarMatrix(AQUEOUS_MM_D / (optics.opticalLengthMm - optics.lensPlaneMm));
  const beforeLens = minus(
    behindLens,
    matrixFromSphereCylinder({
      sphereD: lens.powerD - lens.cylinderD / 2,
      cylinderD: lens.cylinderD, // strongest across the marks
      axisDeg: lens.axisDeg,
    }),
  );
  const behindCornea = steppedBack(beforeLens, optics.lensPlaneMm / AQUEOUS_MM_D);
  if (behindCornea === undefined) throw new OutOfRangeError('lens.powerD', lens.powerD, hardLimits.powerD);
  const beforeCornea = minus(behindCornea, cornealMatrix(optics, question.astigmatism));
  const spectacle = steppedBack(beforeCornea, vertexMm / 1000);
  if (spectacle === undefined) throw new OutOfRangeError('lens.powerD', lens.powerD, hardLimits.powerD);
  return sphereCylinderFromMatrix(spectacle);
}

/** The cornea's strong meridian is the steep one, so as a plus cylinder its axis lies across. */
function cornealMatrix(optics: ThinLensEye, astigmatism: Astigmatism) {
  const cylinderD = optics.indexRatio * astigmatism.cylinderD;
  return matrixFromSphereCylinder({
    sphereD: optics.cornealPowerD - cylinderD / 2,
    cylinderD,
    axisDeg: astigmatism.steepAxisDeg + 90,
  });
}
