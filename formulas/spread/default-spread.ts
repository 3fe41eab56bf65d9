/**
 * Default spread — how far refractions fall from the prediction, by the way the axial length was measured.
 *
 * Inputs: method; whether optical biometry had failed in this eye; whether the cornea had refractive surgery.
 * Result: independent parts. At the average eye (AL 23.49 mm, K 44.26 D, ACD 3.10 mm, lens for emmetropia) their
 *   total, as the mean over the five formulas, is the published prediction error:
 *     optical    0.45 D   (SRK/T SD 0.44 D in 888 eyes [V]; An 2019 swept-source MAE 0.36 D * sqrt(pi/2) = 0.45 D [V])
 *     immersion  0.54 D   (MAE 0.43 D * sqrt(pi/2), German randomised trial [V])
 *     contact    0.66 D   (MAE 0.53 D * sqrt(pi/2), same trial [V])
 *     ultrasound where optical failed 0.80 D (MAE 0.64 D * sqrt(pi/2), An 2019: dense cataract [V])
 *     after corneal refractive surgery, optical 0.71 D (0.70 to 0.72 D, Wu 2017 [V])
 *   One formula differs from the mean by up to 7 %: Haigis passes most of an axial-length error on, SRK/T least.
 * Outside the valid range: throws InvalidOptionError for a method that does not exist, or an optical measurement in an
 *   eye that optical biometry is said to have failed in.
 * Source: measurement SDs from Langenbucher et al., PLOS ONE 2025 e0321786 [V]; ratio of lens position to refraction
 *   35:27 from Norrby, J Cataract Refract Surg 2008;34:368-376 [V abstract]; label tolerance see iso-tolerance.ts.
 * Erratum / variant: lens position and refraction share what measurement and label leave of the total, in Norrby's
 *   ratio [D]; the ultrasound axial-length SDs are what the published totals leave [D]. The figure so found for
 *   immersion, 0.133 mm, is close to the 0.126 mm that Norrby's shares imply for the ultrasound era. Errors are taken as independent and normal:
 *   axial-length errors grow with length and are correlated, so this is an approximation. A surgeon's own results are
 *   better once there are 30.
 */
import { InvalidOptionError, OutOfRangeError } from '../errors';
import type { Spread, SpreadPart } from './spread';

export type AxialLengthMethod = 'optical' | 'immersion' | 'contact';

export interface DefaultSpreadOptions {
  /** Ultrasound because optical biometry could not read the eye: dense cataract. */
  hasOpticalFailed?: boolean;
  hasRefractiveSurgery?: boolean;
}

const WITHIN_SUBJECT = 'Langenbucher et al., PLOS ONE 2025 e0321786, 266 cataract eyes';
const GERMAN_TRIAL =
  'so that the total agrees with a German randomised trial (mean absolute error 0.43 and 0.53 D)';
const AN_2019 =
  'so that the total agrees with An et al. 2019 (mean absolute error 0.64 D where optical failed)';

export function defaultSpread(method: AxialLengthMethod, options: DefaultSpreadOptions = {}): Spread {
  const parts = [
    axialLengthPart(method, options),
    keratometry,
    depthPart(method),
    label,
    position,
    refraction,
  ];
  return { parts: options.hasRefractiveSurgery ? [...parts, surgery] : parts };
}

/** The surgeon's own prediction errors in place of all parts. Below 30 cases the default is the better guess. */
export function spreadOfOwnResults(sdD: number, caseCount: number): Spread {
  const range = { min: OWN_RESULTS_FROM_CASES, max: Number.MAX_SAFE_INTEGER };
  if (!(caseCount >= range.min)) throw new OutOfRangeError('caseCount', caseCount, range);
  const part: SpreadPart = {
    source: `Own results in ${caseCount} eyes`,
    input: 'refractionD',
    sd: sdD,
    mark: 'V',
    reference: 'standard deviation of own prediction errors',
  };
  return { parts: [part] };
}

export const OWN_RESULTS_FROM_CASES = 30;

function axialLengthPart(method: AxialLengthMethod, { hasOpticalFailed }: DefaultSpreadOptions): SpreadPart {
  switch (method) {
    case 'optical':
      if (hasOpticalFailed) {
        throw new InvalidOptionError('method', method, 'contradicts an eye in which optical biometry failed');
      }
      return {
        ...axialLength,
        source: 'Axial length, optical',
        sd: 0.0177,
        mark: 'V',
        reference: WITHIN_SUBJECT,
      };
    case 'immersion':
    case 'contact':
      return ultrasoundPart(method, hasOpticalFailed === true);
    default:
      throw new InvalidOptionError('method', method);
  }
}

function ultrasoundPart(method: 'immersion' | 'contact', isDense: boolean): SpreadPart {
  if (isDense) {
    const source = `Axial length, ${method} ultrasound, optical failed`;
    return { ...axialLength, source, sd: DENSE_SD_MM, mark: 'D', reference: AN_2019 };
  }
  const sd = method === 'immersion' ? IMMERSION_SD_MM : CONTACT_SD_MM;
  const source = `Axial length, ${method} ultrasound`;
  return { ...axialLength, source, sd, mark: 'D', reference: GERMAN_TRIAL };
}

function depthPart(method: AxialLengthMethod): SpreadPart {
  if (method === 'optical') return { ...depth, sd: 0.0247, mark: 'V', reference: WITHIN_SUBJECT };
  const reference = 'scatter above which ultrasound depth is measured again';
  return { ...depth, sd: 0.1, mark: 'CP', reference };
}

/** Derived, see the docblock: sqrt(total^2 - the other parts^2) over the change per mm at the average eye. */
const IMMERSION_SD_MM = 0.133;
const CONTACT_SD_MM = 0.213;
const DENSE_SD_MM = 0.29;

const axialLength = { input: 'axialLengthMm' } as const;
const depth = { source: 'Anterior chamber depth', input: 'anteriorChamberDepthMm' } as const;

const keratometry: SpreadPart = {
  source: 'Keratometry',
  input: 'keratometryD',
  sd: 0.18,
  mark: 'V',
  reference: WITHIN_SUBJECT,
};

const label: SpreadPart = {
  source: 'Lens power against its label',
  input: 'lensPowerD',
  sd: 'isoTolerance',
  mark: 'D',
  reference: 'ISO 11979-2 half-width over the square root of 3',
};

const REMAINDER = 'what measurement and label leave of 0.45 D, shared 35:27 (Norrby 2008)';

const position: SpreadPart = {
  source: 'Where the lens settles',
  input: 'lensPositionMm',
  sd: 0.227,
  mark: 'D',
  reference: REMAINDER,
};

const refraction: SpreadPart = {
  source: 'Refraction after surgery',
  input: 'refractionD',
  sd: 0.258,
  mark: 'D',
  reference: REMAINDER,
};

/** sqrt(0.71^2 - 0.45^2). */
const surgery: SpreadPart = {
  source: 'Cornea after refractive surgery',
  input: 'refractionD',
  sd: 0.55,
  mark: 'D',
  reference: 'so that the total is 0.71 D (0.70 to 0.72 D: Wu 2017, BMC Ophthalmol 17:44)',
};
