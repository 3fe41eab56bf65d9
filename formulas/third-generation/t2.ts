/**
 * T2 — SRK/T with a regression for the corneal height, which has no cusp and no negative radicand.
 *
 * Inputs: axialLengthMm, mm, 14 to 40; corneal radii, mm, 5.19 to 13.5 (K 25 to 65 D, index 1.3375);
 *   aConstant 110 to 125.
 * Result: the thin-lens eye; elpMm is the lens plane, mm from the cornea.
 * Outside the valid range: throws OutOfRangeError naming the input. Never clamps.
 * Source: Sheard, Smith, Cooke, J Cataract Refract Surg 2010;36:1829-1834 [M]; the rest as SRK/T.
 * Erratum / variant: the axial length enters raw, without SRK/T's correction beyond 24.2 mm. H2 agrees with
 *   SRK/T's height to 0.02 mm at AL 23.5 mm and K 44 D. Not more accurate than SRK/T in 63 eyes beyond 25 mm (mean
 *   absolute error 0.435 against 0.418 D) [V Idrobo-Robalino 2019].
 */
import { constantOf } from '../constants/kinds';
import { lensPositionFromAConstant } from '../constants/conversions';
import { FROM_MEMORY_CAUTION } from '../facts-types';
import { meanKeratometryD } from '../units/corneal-power';
import { srktOptics } from './srkt';
import type { FormulaFacts } from '../facts-types';
import type { ThinLensEye } from '../optics/thin-lens';
import type { LensConstants } from '../types';
import type { FormulaEye } from './formula-eye';

export function t2(eye: FormulaEye, constants: LensConstants): ThinLensEye {
  const heightMm = -10.326 + 0.3263 * eye.axialLengthMm + 0.13533 * meanKeratometryD(eye.elpCornea); // H2
  return srktOptics(eye, heightMm + lensPositionFromAConstant(constantOf(constants, 'aConstant')), []);
}

export const t2Facts: FormulaFacts = {
  id: 't2',
  name: 'T2',
  year: 2010,
  equations: [
    { text: 'H2 = -10.326 + 0.32630 AL + 0.13533 K in place of H; everything else as SRK/T', mark: 'M' },
  ],
  sources: [
    { citation: 'Sheard, Smith, Cooke, J Cataract Refract Surg 2010;36:1829-1834', mark: 'M' },
    { citation: 'Idrobo-Robalino et al., BMC Ophthalmol 2019;19:222: 63 eyes beyond 25 mm', mark: 'V' },
  ],
  validRange:
    'Not to be taken as better than SRK/T beyond 25 mm: mean absolute error 0.435 against 0.418 D in 63 eyes.',
  notKnown: ['The paper could not be opened: both coefficients and the intercept are recalled.'],
  caution: FROM_MEMORY_CAUTION,
};
