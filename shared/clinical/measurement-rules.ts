/** Checks of one eye's values against published limits and common practice. */
import { CHECK_LIMITS as LIMITS } from './check-thresholds';
import type { CheckRule } from './check-facts';

const KNOX_CARTWRIGHT =
  'Knox Cartwright, Johnston, Jaycock, Tole, Sparrow, Eye 2010;24:894-900 (55,567 operations)';
const fixed = (value: number, decimals = 2): string => value.toFixed(decimals);
const isOutside = (value: number, { low, high }: { low: number; high: number }): boolean =>
  value < low || value > high;

export const MEASUREMENT_RULES: readonly CheckRule[] = [
  {
    id: 'axial-length-outlier',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ axialLengthMm }) =>
      isOutside(axialLengthMm, LIMITS.axialLengthMm)
        ? {
            severity: 'weigh',
            message: `Axial length ${fixed(axialLengthMm)} mm lies outside ${fixed(LIMITS.axialLengthMm.low)} to ${fixed(LIMITS.axialLengthMm.high)} mm`,
            advice: 'Repeat it, by a second operator.',
          }
        : null,
  },
  {
    id: 'keratometry-outlier',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ meanKeratometryD }) =>
      isOutside(meanKeratometryD, LIMITS.meanKeratometryD)
        ? {
            severity: 'weigh',
            message: `Mean keratometry ${fixed(meanKeratometryD)} D lies outside ${fixed(LIMITS.meanKeratometryD.low)} to ${fixed(LIMITS.meanKeratometryD.high)} D`,
            advice: 'Repeat it and look at the topography.',
          }
        : null,
  },
  {
    id: 'corneal-astigmatism',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ cornealCylinderD }) =>
      cornealCylinderD > LIMITS.cornealCylinderD
        ? {
            severity: 'weigh',
            message: `Corneal astigmatism ${fixed(cornealCylinderD)} D is above ${fixed(LIMITS.cornealCylinderD)} D`,
            advice: 'Look at the topography.',
          }
        : null,
  },
  {
    id: 'axial-length-repeatability',
    source: 'common practice; contact mean SD 0.14 mm, immersion 0.03 mm: Ademola-Popoola 2016 [V]',
    mark: 'CP',
    judge: ({ values, isUltrasound }) => {
      const limit = LIMITS.axialLengthSdMm[isUltrasound ? 'ultrasound' : 'optical'];
      const sdMm = values.axialLengthSdMm;
      if (sdMm === null || sdMm <= limit.note) return null;
      return {
        severity: sdMm > limit.weigh ? 'weigh' : 'note',
        message: `Axial length readings scatter by ${fixed(sdMm)} mm (SD); up to ${fixed(limit.note)} mm is good`,
        advice: 'Repeat the measurement.',
      };
    },
  },
  {
    id: 'thick-lens',
    source: 'cataract cohort of 28,709 eyes, 4.52 ± 0.45 mm [V]; limits at +1 and +2 SD derived',
    mark: 'D',
    judge: ({ values: { lensThicknessMm } }) =>
      lensThicknessMm !== null && lensThicknessMm > LIMITS.lensThicknessMm.note
        ? {
            severity: lensThicknessMm > LIMITS.lensThicknessMm.weigh ? 'weigh' : 'note',
            message: `Lens thickness ${fixed(lensThicknessMm)} mm is above ${fixed(LIMITS.lensThicknessMm.note)} mm`,
            advice: 'Look for a swollen lens; the capsule opening may tend to run out.',
          }
        : null,
  },
  {
    id: 'shallow-chamber',
    source: 'common practice, from memory',
    mark: 'CP',
    judge: ({ chamberDepthMm, history }) =>
      chamberDepthMm !== null &&
      chamberDepthMm < LIMITS.shallowChamberMm &&
      (history.lensStatus ?? 'phakic') === 'phakic'
        ? {
            severity: 'weigh',
            message: `Anterior chamber ${fixed(chamberDepthMm)} mm is shallow${chamberDepthMm < LIMITS.veryShallowChamberMm ? ', high risk' : ''}`,
            advice: 'Mind the endothelium and the angle; formulas may disagree here.',
          }
        : null,
  },
  {
    id: 'chamber-and-lens',
    source: 'common practice; usual sum about 7.5 mm [D]',
    mark: 'CP',
    judge: ({ chamberDepthMm, values: { lensThicknessMm } }) => {
      if (chamberDepthMm === null || lensThicknessMm === null) return null;
      const sumMm = chamberDepthMm + lensThicknessMm;
      return isOutside(sumMm, LIMITS.chamberAndLensMm)
        ? {
            severity: 'note',
            message: `Chamber depth and lens thickness add up to ${fixed(sumMm)} mm, usually 6.5 to 8.5`,
            advice: 'Check both against the source.',
          }
        : null;
    },
  },
  {
    id: 'white-to-white',
    source: 'population 11.80 ± 0.42 mm [V]; limits common practice',
    mark: 'CP',
    judge: ({ values: { whiteToWhiteMm } }) =>
      whiteToWhiteMm !== null && isOutside(whiteToWhiteMm, LIMITS.whiteToWhiteMm)
        ? {
            severity: 'note',
            message: `White-to-white ${fixed(whiteToWhiteMm)} mm is unusual`,
            advice: 'Check it against the source.',
          }
        : null,
  },
  {
    id: 'corneal-thickness',
    source: 'population 544 ± 38 µm [V]; limits common practice',
    mark: 'CP',
    judge: ({ values: { cornealThicknessUm } }) =>
      cornealThicknessUm !== null && isOutside(cornealThicknessUm, LIMITS.cornealThicknessUm)
        ? {
            severity: 'note',
            message: `Corneal thickness ${fixed(cornealThicknessUm, 0)} µm is unusual`,
            advice: 'Thin: think of earlier laser surgery or ectasia. Thick: of swelling.',
          }
        : null,
  },
  {
    id: 'length-to-radius',
    source: 'derived: usual ratio about 3.05; limits common practice',
    mark: 'CP',
    judge: ({ axialLengthMm, meanRadiusMm }) => {
      const ratio = axialLengthMm / meanRadiusMm;
      return isOutside(ratio, LIMITS.axialLengthToRadius)
        ? {
            severity: 'weigh',
            message: `Axial length over corneal radius is ${fixed(ratio)}, outside 2.7 to 3.5`,
            advice: 'Check units and eye; think of earlier corneal surgery.',
          }
        : null;
    },
  },
  {
    id: 'contact-ultrasound',
    source:
      'contact reads 0.15 to 0.27 mm shorter than immersion (three series) [V]; a short length asks for too much power: a nearsighted result [D]',
    mark: 'V',
    judge: ({ values }) =>
      values.method === 'contact'
        ? {
            severity: 'weigh',
            message: 'Axial length by contact ultrasound: it tends to read too short',
            advice: 'Prefer immersion or optical; expect a nearsighted tendency.',
          }
        : null,
  },
  {
    id: 'measured-long-ago',
    source: 'Rufai et al. cohort: repeat after 24 months [V*]; Northwestern 2023 found little change [V]',
    mark: 'V*',
    judge: ({ ageDays }) =>
      ageDays > LIMITS.ageDays.note
        ? {
            severity: ageDays > LIMITS.ageDays.weigh ? 'weigh' : 'note',
            message: `Measured ${Math.floor(ageDays / 30.44)} months ago`,
            advice:
              ageDays > LIMITS.ageDays.weigh
                ? 'Measure again.'
                : 'Measure again if anything happened to the eye since.',
          }
        : null,
  },
  {
    id: 'values-missing',
    source: 'common practice',
    mark: 'CP',
    judge: ({ values }) => {
      const missing = [
        ...(values.acdMm === null ? ['anterior chamber depth'] : []),
        ...(values.lensThicknessMm === null ? ['lens thickness'] : []),
        ...(values.cornealThicknessUm === null ? ['corneal thickness'] : []),
      ];
      return missing.length > 0
        ? {
            severity: 'note',
            message: `Not measured: ${missing.join(', ')}`,
            advice: 'Measure what is missing if the choice hangs on it.',
          }
        : null;
    },
  },
  {
    id: 'chamber-depth-reference',
    source: 'chamber depth from the back of the cornea is shorter by the cornea [D]',
    mark: 'D',
    judge: ({ values, chamberDepthMm }) =>
      values.acdMm !== null && chamberDepthMm === null
        ? {
            severity: 'weigh',
            message:
              'The chamber depth was taken from the back of the cornea, and the corneal thickness is not known',
            advice: 'Measure the corneal thickness: Haigis is silent without it.',
          }
        : null,
  },
  {
    id: 'axes-missing',
    source: 'common practice',
    mark: 'CP',
    judge: ({ values, cornealCylinderD }) =>
      values.steepAxisDeg === null &&
      values.flatAxisDeg === null &&
      cornealCylinderD >= LIMITS.axisMattersFromD
        ? {
            severity: 'note',
            message: `Astigmatism of ${fixed(cornealCylinderD)} D without an axis`,
            advice: 'Measure the axis before thinking of a toric lens.',
          }
        : null,
  },
];
