/** Checks that compare the two eyes. */
import type { CheckFacts, CheckRule } from './check-facts';
import { usedEye } from './effective-eye';
import { KNOX_CARTWRIGHT } from './length-and-cornea-rules';
import { isAbove, isAtLeast, passing } from './limits';

export const BETWEEN_EYES_RULES: readonly CheckRule[] = [
  {
    id: 'between-eyes-axial-length',
    source: `${KNOX_CARTWRIGHT} [M]; 0.30 mm and more occurs in 24 % of 1,379 patients, JCRS 2008, PMID 18165085 [V]`,
    mark: 'M',
    judge: ({ axialLengthMm, fellow, limits: { betweenEyesAxialLengthMm: limit } }) => {
      if (!fellow) return null;
      const differenceMm = Math.abs(axialLengthMm - fellow.axialLengthMm);
      if (!isAtLeast(differenceMm, limit.note)) return null;
      const isLarge = isAbove(differenceMm, limit.weigh);
      const longerMm = Math.max(axialLengthMm, fellow.axialLengthMm);
      return {
        severity: isLarge ? 'weigh' : 'note',
        message: `The axial lengths of the two eyes differ by ${passing(differenceMm, isLarge ? [limit.weigh] : [])} mm`,
        advice: `${isLarge ? 'Repeat both, and look' : 'Look'} whether the old refractions explain it. ${howUsual(longerMm)}`,
      };
    },
  },
  {
    id: 'between-eyes-keratometry',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ meanKeratometryD, fellow, limits: { betweenEyesKeratometryD: limitD } }) => {
      if (!fellow) return null;
      const differenceD = Math.abs(meanKeratometryD - usedEye(fellow).meanKeratometryD);
      return isAbove(differenceD, limitD)
        ? {
            severity: 'weigh',
            message: `The mean keratometry of the two eyes differs by ${passing(differenceD, [limitD])} D`,
            advice: 'Repeat both; ask for contact lenses and earlier surgery.',
          }
        : null;
    },
  },
  {
    id: 'between-eyes-identical',
    source:
      'common practice; opposite-eye biometry is a published cause of wrong lenses (Steeples et al., Eye 2016 [V])',
    mark: 'CP',
    judge: (facts) =>
      isCopy(facts)
        ? {
            severity: 'weigh',
            message: 'Both eyes carry the very same length and cornea: one may be a copy of the other',
            advice: 'Compare with the source, side by side.',
          }
        : null,
  },
  {
    id: 'between-eyes-method',
    source:
      'optical reads 0.18 mm longer than immersion, 0.47 mm than contact (Hitzenberger et al., 196 eyes) [V]',
    mark: 'V',
    judge: ({ isUltrasound, fellow }) =>
      fellow && isUltrasound !== (fellow.method !== 'optical')
        ? {
            severity: 'note',
            message: 'One eye was measured optically, the other by ultrasound',
            advice: 'The two lengths are not the same quantity; each uses its own constants.',
          }
        : null,
  },
];

/** 95th centile of the difference, by the longer eye: Moorfields series, JCRS 2008, PMID 18165085 [V]. */
const SHORT_PAIR = { upToMm: 22, centileMm: 0.5 };
const LONG_PAIR = { fromMm: 28, centileMm: 4 };

function howUsual(longerMm: number): string {
  const nineteenOfTwenty = 'Nineteen of twenty patients whose longer eye is';
  const short = `${SHORT_PAIR.upToMm} mm or shorter differ by less than ${SHORT_PAIR.centileMm.toFixed(1)} mm`;
  const long = `${LONG_PAIR.fromMm} mm or longer by less than ${LONG_PAIR.centileMm.toFixed(1)} mm`;
  if (longerMm <= SHORT_PAIR.upToMm) return `${nineteenOfTwenty} ${short}.`;
  if (longerMm >= LONG_PAIR.fromMm) return `Usual in long eyes: those of ${long}, in nineteen of twenty.`;
  return `${nineteenOfTwenty} ${short}, ${long}.`;
}

function isCopy({ values, fellow }: CheckFacts): boolean {
  return (
    fellow !== null &&
    values.axialLengthMm === fellow.axialLengthMm &&
    values.flatRadiusMm === fellow.flatRadiusMm &&
    values.steepRadiusMm === fellow.steepRadiusMm
  );
}
