/**
 * Checks of what is known about the eye. Unanswered and unknown are never taken for "no".
 */
import type { CheckRule } from './check-facts';

export const HISTORY_RULES: readonly CheckRule[] = [
  {
    id: 'corneal-surgery-unanswered',
    source: 'common practice; after laser surgery plain formulas leave a refractive surprise [M]',
    mark: 'CP',
    judge: ({ history: { cornealSurgery } }) => {
      if (cornealSurgery === 'yes' || cornealSurgery === 'no') return null;
      return cornealSurgery === null
        ? {
            severity: 'stop',
            message: 'Nobody has answered whether this cornea had surgery',
            advice: 'Ask the patient and record the answer; look at the topography when in doubt.',
          }
        : {
            severity: 'stop',
            message: 'It is not known whether this cornea had surgery',
            advice: 'Look at the topography and earlier records; settle this by name before signing.',
          };
    },
  },
  {
    id: 'corneal-surgery',
    source:
      'hyperopic surprise after myopic laser, myopic after hyperopic: from memory of the literature; no automatic recommendation from plain formulas: common practice',
    mark: 'M',
    canBeSettled: false,
    judge: ({ history }) =>
      history.cornealSurgery === 'yes'
        ? {
            severity: 'stop',
            message: 'This cornea had surgery: the plain formulas are silent',
            advice:
              'Use the methods published for such eyes; expect wider errors and tell the patient so. No reason makes the plain formulas hold here.',
          }
        : null,
  },
  {
    id: 'lens-status-missing',
    source: 'common practice; the lens status decides velocity and constants',
    mark: 'CP',
    judge: ({ history }) =>
      history.lensStatus === null
        ? {
            severity: 'stop',
            message: 'The lens status of this eye is not recorded',
            advice: 'Record whether the eye is phakic, pseudophakic or aphakic.',
          }
        : null,
  },
  {
    id: 'lens-status-not-phakic',
    source:
      'common practice; the formulas predict where a lens settles that takes the place of the natural one',
    mark: 'CP',
    judge: ({ history: { lensStatus } }) =>
      lensStatus !== null && lensStatus !== 'phakic'
        ? {
            severity: 'note',
            message: `This eye is recorded as ${LENS_STATUS_WORDS[lensStatus]}: the plain formulas are silent`,
            advice: 'Check side and record if a natural lens was expected here.',
          }
        : null,
  },
  {
    id: 'vitreous-status-missing',
    source: 'common practice; sound travels slower in silicone oil (about 980 to 1040 m/s, from memory)',
    mark: 'CP',
    judge: ({ history, isUltrasound }) =>
      isUltrasound && (history.vitreousStatus === null || history.vitreousStatus === 'unknown')
        ? {
            severity: 'stop',
            message: 'Measured by ultrasound, and it is not recorded what fills the eye',
            advice: 'Record vitreous, silicone oil or gas: the velocity depends on it.',
          }
        : null,
  },
  {
    id: 'silicone-oil',
    source: 'velocities in silicone oil (about 980 to 1040 m/s against 1532), from memory',
    mark: 'M',
    canBeSettled: false,
    judge: ({ history, isUltrasound }) =>
      history.vitreousStatus === 'silicone-oil' && isUltrasound
        ? {
            severity: 'stop',
            message: 'Silicone oil in an eye measured by ultrasound: the length is wrong',
            advice:
              'Measure optically; decide with the retinal surgeon whether the oil stays. The plain formulas are silent.',
          }
        : null,
  },
  {
    id: 'vitreous-replaced',
    source: 'oil and gas change the optics of the eye behind the lens, which plain formulas do not know [M]',
    mark: 'M',
    judge: ({ history: { vitreousStatus }, isUltrasound }) => {
      const isOil = vitreousStatus === 'silicone-oil' && !isUltrasound;
      if (!isOil && vitreousStatus !== 'gas') return null;
      return {
        severity: 'weigh',
        message: `${isOil ? 'Silicone oil' : 'Gas'} in the eye: the plain formulas are silent`,
        advice: 'Decide with the retinal surgeon when to measure and to operate.',
      };
    },
  },
];

const LENS_STATUS_WORDS = {
  pseudophakic: 'pseudophakic',
  aphakic: 'aphakic',
  'phakic-lens': 'carrying a lens in front of its natural one',
} as const;
