/** Checks of axial length and keratometry against published limits and common practice. */
import type { CheckRule } from './check-facts';
import { fixed, isAbove, isOutside, passing } from './limits';

export const KNOX_CARTWRIGHT =
  'Knox Cartwright, Johnston, Jaycock, Tole, Sparrow, Eye 2010;24:894-900 (55,567 operations)';

export const LENGTH_AND_CORNEA_RULES: readonly CheckRule[] = [
  {
    id: 'axial-length-outlier',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ axialLengthMm, limits: { axialLengthMm: band } }) =>
      isOutside(axialLengthMm, band)
        ? {
            severity: 'weigh',
            message: `Axial length ${passing(axialLengthMm, [band.low, band.high])} mm lies outside ${fixed(band.low)} to ${fixed(band.high)} mm`,
            advice: 'Repeat it, by a second operator.',
          }
        : null,
  },
  {
    id: 'keratometry-outlier',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ meanKeratometryD, limits: { meanKeratometryD: band } }) =>
      isOutside(meanKeratometryD, band)
        ? {
            severity: 'weigh',
            message: `Mean keratometry ${passing(meanKeratometryD, [band.low, band.high])} D lies outside ${fixed(band.low)} to ${fixed(band.high)} D`,
            advice: 'Repeat it and look at the topography.',
          }
        : null,
  },
  {
    id: 'meridian-outlier',
    source: 'common practice; population 44.26 ± 1.70 D in one meridian (28,709 eyes) [V]',
    mark: 'CP',
    judge: ({ meanKeratometryD, cornealCylinderD, limits: { keratometryD: band } }) => {
      const [flatD, steepD] = [
        meanKeratometryD - cornealCylinderD / 2,
        meanKeratometryD + cornealCylinderD / 2,
      ];
      if (!isOutside(flatD, band) && !isOutside(steepD, band)) return null;
      return {
        severity: 'note',
        message: `Keratometry ${passing(flatD, [band.low])} and ${passing(steepD, [band.high])} D: one meridian lies outside ${fixed(band.low, 0)} to ${fixed(band.high, 0)} D`,
        advice: 'Look at the topography; think of ectasia and of earlier surgery.',
      };
    },
  },
  {
    id: 'corneal-astigmatism',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ cornealCylinderD, limits: { cornealCylinderD: limitD } }) =>
      isAbove(cornealCylinderD, limitD)
        ? {
            severity: 'weigh',
            message: `Corneal astigmatism ${passing(cornealCylinderD, [limitD])} D is above ${fixed(limitD)} D`,
            advice: 'Look at the topography.',
          }
        : null,
  },
  {
    id: 'length-to-radius',
    source: 'derived: usual ratio about 3.05; limits common practice',
    mark: 'CP',
    judge: ({ axialLengthMm, meanRadiusMm, limits: { axialLengthToRadius: band } }) => {
      const ratio = axialLengthMm / meanRadiusMm;
      return isOutside(ratio, band)
        ? {
            severity: 'weigh',
            message: `Axial length over corneal radius is ${passing(ratio, [band.low, band.high])}, outside ${fixed(band.low, 1)} to ${fixed(band.high, 1)}`,
            advice: 'Check units and eye; think of earlier corneal surgery.',
          }
        : null;
    },
  },
  {
    id: 'axial-length-repeatability',
    source: 'common practice; contact mean SD 0.14 mm, immersion 0.03 mm: Ademola-Popoola 2016 [V]',
    mark: 'CP',
    judge: ({ values: { axialLengthSdMm: sdMm }, isUltrasound, limits: { axialLengthSdMm } }) => {
      const limit = axialLengthSdMm[isUltrasound ? 'ultrasound' : 'optical'];
      if (sdMm === null || !isAbove(sdMm, limit.note)) return null;
      return {
        severity: isAbove(sdMm, limit.weigh) ? 'weigh' : 'note',
        message: `Axial length readings scatter by ${passing(sdMm, [limit.note, limit.weigh])} mm (SD); up to ${fixed(limit.note)} mm is good`,
        advice: 'Repeat the measurement.',
      };
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
];
