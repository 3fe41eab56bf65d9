/** Checks of what lies between cornea and vitreous: chamber, lens, corneal thickness, white-to-white. */
import { yearsBetween } from './calendar-age';
import type { CheckFacts, CheckRule, Finding } from './check-facts';
import { fixed, isAbove, isBelow, isOutside, passing } from './limits';

export const CHAMBER_AND_LENS_RULES: readonly CheckRule[] = [
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
    id: 'shallow-chamber',
    source: 'common practice, from memory',
    mark: 'CP',
    judge: ({ chamberDepthMm, mayBePhakic, limits: { shallowChamberMm, veryShallowChamberMm } }) =>
      chamberDepthMm !== null && mayBePhakic && isBelow(chamberDepthMm, shallowChamberMm)
        ? {
            severity: 'weigh',
            message: `Anterior chamber ${passing(chamberDepthMm, [shallowChamberMm])} mm is shallow${isBelow(chamberDepthMm, veryShallowChamberMm) ? ', high risk' : ''}`,
            advice: 'Mind the endothelium and the angle; formulas may disagree here.',
          }
        : null,
  },
  {
    id: 'deep-chamber',
    source: 'common practice; population 3.10 ± 0.47 mm [V]',
    mark: 'CP',
    judge: ({ chamberDepthMm, mayBePhakic, limits: { deepChamberMm } }) =>
      chamberDepthMm !== null && mayBePhakic && isAbove(chamberDepthMm, deepChamberMm)
        ? {
            severity: 'note',
            message: `Anterior chamber ${passing(chamberDepthMm, [deepChamberMm])} mm is deeper than ${fixed(deepChamberMm)} mm`,
            advice: 'Check it against the source, and that the eye has its natural lens.',
          }
        : null,
  },
  {
    id: 'thick-lens',
    source: 'cataract cohort of 28,709 eyes, 4.52 ± 0.45 mm [V]; limits at +1 and +2 SD [D]',
    mark: 'D',
    judge: ({ values: { lensThicknessMm }, limits: { lensThicknessMm: limit } }) =>
      lensThicknessMm !== null && isAbove(lensThicknessMm, limit.note)
        ? {
            severity: isAbove(lensThicknessMm, limit.weigh) ? 'weigh' : 'note',
            message: `Lens thickness ${passing(lensThicknessMm, [limit.note, limit.weigh])} mm is above ${fixed(limit.note)} mm`,
            advice: 'Look for a swollen lens; the capsule opening may tend to run out.',
          }
        : null,
  },
  {
    id: 'thin-lens',
    source: 'common practice; cataract cohort of 28,709 eyes, 4.52 ± 0.45 mm [V]',
    mark: 'CP',
    judge: ({ values: { lensThicknessMm }, mayBePhakic, limits: { lensThicknessMm: limit } }) =>
      lensThicknessMm !== null && mayBePhakic && isBelow(lensThicknessMm, limit.low)
        ? {
            severity: 'note',
            message: `Lens thickness ${passing(lensThicknessMm, [limit.low])} mm is below ${fixed(limit.low)} mm`,
            advice: 'Check it against the source; a leaking mature lens can be thin.',
          }
        : null,
  },
  {
    id: 'swollen-lens',
    source:
      'lens above 5.0 mm with a chamber below 2.5 mm, or thicker than its fellow by 0.5 mm: common practice, from memory',
    mark: 'CP',
    judge: swollenLens,
  },
  {
    id: 'chamber-and-lens',
    source: 'common practice; usual sum about 7.5 mm [D]',
    mark: 'CP',
    judge: ({ chamberDepthMm, values: { lensThicknessMm }, limits: { chamberAndLensMm: band } }) => {
      if (chamberDepthMm === null || lensThicknessMm === null) return null;
      const sumMm = chamberDepthMm + lensThicknessMm;
      if (!isOutside(sumMm, band)) return null;
      return {
        severity: isAbove(sumMm, band.impossible) ? 'weigh' : 'note',
        message: `Chamber depth and lens thickness add up to ${passing(sumMm, [band.low, band.high])} mm, usually ${fixed(band.low, 1)} to ${fixed(band.high, 1)}`,
        advice: 'Check both against the source.',
      };
    },
  },
  {
    id: 'white-to-white',
    source: 'population 11.80 ± 0.42 mm [V]; limits common practice',
    mark: 'CP',
    judge: ({ values: { whiteToWhiteMm }, limits: { whiteToWhiteMm: band } }) =>
      whiteToWhiteMm !== null && isOutside(whiteToWhiteMm, band)
        ? {
            severity: 'note',
            message: `White-to-white ${passing(whiteToWhiteMm, [band.low, band.high])} mm lies outside ${fixed(band.low)} to ${fixed(band.high)} mm`,
            advice: 'Check it against the source.',
          }
        : null,
  },
  {
    id: 'corneal-thickness',
    source: 'population 544 ± 38 µm [V]; limits common practice',
    mark: 'CP',
    judge: ({ values: { cornealThicknessUm }, limits: { cornealThicknessUm: band } }) =>
      cornealThicknessUm !== null && isOutside(cornealThicknessUm, band)
        ? {
            severity: 'note',
            message: `Corneal thickness ${passing(cornealThicknessUm, [band.low, band.high], 0)} µm lies outside ${band.low} to ${band.high} µm`,
            advice: 'Thin: think of earlier laser surgery or ectasia. Thick: of swelling.',
          }
        : null,
  },
];

/** Names the signs that were seen, and those that would decide it and are missing. */
function swollenLens(facts: CheckFacts): Finding | null {
  const thicknessMm = facts.values.lensThicknessMm;
  if (thicknessMm === null || !facts.mayBePhakic) return null;
  const signs = [...thickAndShallow(facts, thicknessMm), ...thickerThanFellow(facts, thicknessMm)];
  if (signs.length === 0) return null;
  return {
    severity: 'weigh',
    message: `Pattern of a swollen lens: ${[`lens ${fixed(thicknessMm)} mm`, ...signs].join(', ')}. Still to look at: ${missingSigns(facts).join(', ')}`,
    advice: `The capsule opening may run out and the lens position is less certain: plan backup lenses, promise nothing that needs a whole capsule.${youngAdvice(facts)}`,
  };
}

function thickAndShallow({ chamberDepthMm, limits }: CheckFacts, thicknessMm: number): string[] {
  const isPattern =
    chamberDepthMm !== null &&
    isAbove(thicknessMm, limits.lensThicknessMm.note) &&
    isBelow(chamberDepthMm, limits.shallowChamberMm);
  return isPattern ? [`chamber ${fixed(chamberDepthMm)} mm`] : [];
}

function thickerThanFellow({ fellowLensThicknessMm, limits }: CheckFacts, thicknessMm: number): string[] {
  if (fellowLensThicknessMm === null) return [];
  const overMm = thicknessMm - fellowLensThicknessMm;
  return isAbove(overMm, limits.lensThicknessOverFellowMm)
    ? [`${passing(overMm, [limits.lensThicknessOverFellowMm])} mm thicker than the fellow lens`]
    : [];
}

function missingSigns({ chamberDepthMm, fellowLensThicknessMm }: CheckFacts): string[] {
  return [
    ...(chamberDepthMm === null ? ['chamber depth'] : []),
    ...(fellowLensThicknessMm === null ? ['thickness of the fellow lens'] : []),
    'white reflex at the slit lamp',
  ];
}

/** Clinical rule 3, young white cataract (common practice). */
function youngAdvice({ patient, today, limits }: CheckFacts): string {
  return yearsBetween(patient.birthDate, today) < limits.youngYears
    ? ' In a patient this young ask for trauma, steroids, atopy, uveitis and diabetes.'
    : '';
}
