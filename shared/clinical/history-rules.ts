/**
 * Checks of what is known about the eye. Unanswered and unknown are never taken for "no".
 */
import type { CheckRule } from './check-facts';

const CP = { mark: 'CP' } as const;

export const HISTORY_RULES: readonly CheckRule[] = [
  {
    id: 'corneal-surgery-unanswered',
    source: 'common practice; after laser surgery plain formulas leave a refractive surprise',
    ...CP,
    judge: ({ history }) => {
      if (history.cornealSurgery === null) {
        return {
          severity: 'stop',
          message: 'Nobody has answered whether this cornea had surgery',
          advice: 'Ask the patient and record the answer; look at the topography when in doubt.',
        };
      }
      if (history.cornealSurgery !== 'unknown') return null;
      return {
        severity: 'stop',
        message: 'It is not known whether this cornea had surgery',
        advice: 'Look at the topography and earlier records; settle this by name before signing.',
      };
    },
  },
  {
    id: 'corneal-surgery',
    source: 'hyperopic surprise after myopic laser, myopic after hyperopic: from memory of the literature',
    mark: 'M',
    judge: ({ history }) =>
      history.cornealSurgery === 'yes'
        ? {
            severity: 'weigh',
            message: 'This cornea had surgery: the plain formulas are silent',
            advice: 'Use the methods published for such eyes; expect wider errors and tell the patient so.',
          }
        : null,
  },
  {
    id: 'lens-status-missing',
    source: 'common practice; the lens status decides velocity and constants',
    ...CP,
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
    id: 'vitreous-status-missing',
    source: 'common practice; sound travels slower in silicone oil (about 980 to 1040 m/s, from memory)',
    ...CP,
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
    source:
      'velocities in silicone oil, from memory; oil changes length by ultrasound and the optics of the eye',
    mark: 'M',
    judge: ({ history, isUltrasound }) => {
      if (history.vitreousStatus !== 'silicone-oil') return null;
      return {
        severity: isUltrasound ? 'stop' : 'weigh',
        message: isUltrasound
          ? 'Silicone oil in an eye measured by ultrasound: the length is wrong unless corrected'
          : 'Silicone oil in the eye: plain formulas are silent',
        advice:
          'Measure optically, or correct the velocity; decide with the retinal surgeon whether the oil stays.',
      };
    },
  },
];
