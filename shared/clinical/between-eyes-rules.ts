/** Checks that compare the two eyes, and the pattern of a swollen lens. */
import { usedEye } from './effective-eye';
import { CHECK_LIMITS as LIMITS } from './check-thresholds';
import type { CheckFacts, CheckRule } from './check-facts';

const KNOX_CARTWRIGHT = 'Knox Cartwright et al., Eye 2010;24:894-900';

export const BETWEEN_EYES_RULES: readonly CheckRule[] = [
  {
    id: 'between-eyes-axial-length',
    source: `${KNOX_CARTWRIGHT} [M]; 0.30 mm and more occurs in 24 % of 1,379 patients, JCRS 2008 [V]`,
    mark: 'M',
    judge: ({ axialLengthMm, fellow }) => {
      if (!fellow) return null;
      const differenceMm = Math.abs(axialLengthMm - fellow.axialLengthMm);
      const { note, weigh } = LIMITS.betweenEyesAxialLengthMm;
      // Lengths carry two decimals: 23.80 and 23.50 differ by 0.30, whatever binary fractions make of it.
      const hundredths = Math.round(differenceMm * 100);
      if (hundredths < Math.round(note * 100)) return null;
      const isLarge = hundredths > Math.round(weigh * 100);
      return {
        severity: isLarge ? 'weigh' : 'note',
        message: `The axial lengths of the two eyes differ by ${differenceMm.toFixed(2)} mm`,
        advice: isLarge
          ? 'Repeat both, and look whether the old refractions explain it.'
          : 'Common; look whether the old refractions explain it.',
      };
    },
  },
  {
    id: 'between-eyes-keratometry',
    source: KNOX_CARTWRIGHT,
    mark: 'M',
    judge: ({ meanKeratometryD, fellow }) => {
      if (!fellow) return null;
      const differenceD = Math.abs(meanKeratometryD - usedEye(fellow).meanKeratometryD);
      return differenceD > LIMITS.betweenEyesKeratometryD
        ? {
            severity: 'weigh',
            message: `The mean keratometry of the two eyes differs by ${differenceD.toFixed(2)} D`,
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
    judge: ({ values, fellow }) =>
      fellow && (values.method === 'optical') !== (fellow.method === 'optical')
        ? {
            severity: 'note',
            message: 'One eye was measured optically, the other by ultrasound',
            advice: 'The two lengths are not the same quantity; each uses its own constants.',
          }
        : null,
  },
  {
    id: 'swollen-lens',
    source:
      'lens above 5.0 mm, chamber below 2.5 mm, lens thicker than the fellow by 0.5 mm: common practice, from memory',
    mark: 'CP',
    judge: swollenLens,
  },
];

function isCopy({ values, fellow }: CheckFacts): boolean {
  return (
    fellow !== null &&
    values.axialLengthMm === fellow.axialLengthMm &&
    values.flatRadiusMm === fellow.flatRadiusMm &&
    values.steepRadiusMm === fellow.steepRadiusMm
  );
}

/** Thick, and besides shallow or much thicker than its fellow; names what would decide it and is missing. */
function swollenLens(facts: CheckFacts): ReturnType<CheckRule['judge']> {
  const thicknessMm = facts.values.lensThicknessMm;
  if (thicknessMm === null || thicknessMm <= LIMITS.lensThicknessMm.note) return null;
  const signs = [...shallowSign(facts), ...thickerSign(facts, thicknessMm)];
  if (signs.length === 0) return null;
  const seen = [`lens ${thicknessMm.toFixed(2)} mm`, ...signs].join(', ');
  return {
    severity: 'weigh',
    message: `Pattern of a swollen lens: ${seen}. Still to look at: ${missingSigns(facts).join(', ')}`,
    advice:
      'The capsule opening may run out and the lens position is less certain: plan backup lenses, promise nothing that needs a whole capsule.',
  };
}

function shallowSign({ chamberDepthMm }: CheckFacts): string[] {
  const isShallow = chamberDepthMm !== null && chamberDepthMm < LIMITS.shallowChamberMm;
  return isShallow ? [`chamber ${chamberDepthMm.toFixed(2)} mm`] : [];
}

function thickerSign({ fellow }: CheckFacts, thicknessMm: number): string[] {
  if (fellow?.lensThicknessMm == null) return [];
  const overFellowMm = thicknessMm - fellow.lensThicknessMm;
  return overFellowMm > LIMITS.lensThicknessOverFellowMm
    ? [`${overFellowMm.toFixed(2)} mm thicker than the fellow lens`]
    : [];
}

function missingSigns({ chamberDepthMm, fellow }: CheckFacts): string[] {
  return [
    ...(chamberDepthMm === null ? ['chamber depth'] : []),
    ...(fellow?.lensThicknessMm == null ? ['thickness of the fellow lens'] : []),
    'white reflex at the slit lamp',
  ];
}
