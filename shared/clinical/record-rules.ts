/** Checks of the record itself: how old it is and what it lacks. */
import { isOlderThanMonths, monthsBetween } from './calendar-age';
import type { CheckRule } from './check-facts';
import { fixed, isAtLeast } from './limits';

export const RECORD_RULES: readonly CheckRule[] = [
  {
    id: 'measured-long-ago',
    source: 'Rufai et al. cohort: repeat after 24 months [V*]; Northwestern 2023 found little change [V]',
    mark: 'V*',
    judge: ({ values: { measuredAt }, today, limits: { ageMonths } }) => {
      if (!isOlderThanMonths(measuredAt, today, ageMonths.note)) return null;
      const isOld = isOlderThanMonths(measuredAt, today, ageMonths.weigh);
      return {
        severity: isOld ? 'weigh' : 'note',
        message: `Measured more than ${monthsBetween(measuredAt, today).whole} months ago`,
        advice: isOld ? 'Measure again.' : 'Measure again if anything happened to the eye since.',
      };
    },
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
    id: 'axes-missing',
    source: 'common practice',
    mark: 'CP',
    judge: ({ values, cornealCylinderD, limits: { axisMattersFromD } }) =>
      values.steepAxisDeg === null &&
      values.flatAxisDeg === null &&
      isAtLeast(cornealCylinderD, axisMattersFromD)
        ? {
            severity: 'note',
            message: `Astigmatism of ${fixed(cornealCylinderD)} D without an axis`,
            advice: 'Measure the axis before thinking of a toric lens.',
          }
        : null,
  },
];
