/**
 * Haigis — predicts the lens plane from measured anterior chamber depth, axial length and three constants.
 *
 * Inputs: axialLengthMm, mm, 14 to 40; corneal radii, mm, 5.19 to 13.5; anteriorChamberDepthMm, mm from the
 *   corneal epithelium to the lens, 1.5 to 6; a0Mm, a1, a2.
 * Result: the thin-lens eye; elpMm is the lens plane, mm from the cornea.
 * Outside the valid range: throws OutOfRangeError naming the input. Never clamps.
 * Source: Haigis, in: Shammas (ed), Intraocular Lens Power Calculations, Slack 2004, ch. 5; Haigis et al., Graefes
 *   Arch Clin Exp Ophthalmol 2000;238:765-773 [M].
 * Erratum / variant: the corneal power is 331.5 over the mean of the two radii, not of the two powers. The default
 *   a0 of an A-constant belongs to ultrasound axial lengths (see constants/conversions).
 */
import { constantOf } from '../constants/kinds';
import { MissingInputError } from '../errors';
import { FROM_MEMORY_CAUTION } from '../facts-types';
import { meanRadiusMm } from '../units/corneal-power';
import type { FormulaFacts } from '../facts-types';
import type { ThinLensEye } from '../optics/thin-lens';
import type { LensConstants, Notice } from '../types';
import type { FormulaEye } from './formula-eye';

export function haigis(eye: FormulaEye, constants: LensConstants): ThinLensEye {
  const acdMm = eye.anteriorChamberDepthMm;
  if (acdMm === undefined) throw new MissingInputError('anteriorChamberDepthMm', 'haigis');
  const lensPlaneMm = // d = a0 + a1 ACD + a2 AL
    constantOf(constants, 'a0Mm') +
    constantOf(constants, 'a1') * acdMm +
    constantOf(constants, 'a2') * eye.axialLengthMm;
  return {
    cornealPowerD: 331.5 / meanRadiusMm(eye.cornea), // DC = 331.5/RC
    indexRatio: 331.5 / 337.5,
    opticalLengthMm: eye.axialLengthMm,
    lensPlaneMm,
    elpMm: lensPlaneMm,
    notices: eye.elpCornea === eye.cornea ? [] : [doubleKNotice],
  };
}

const doubleKNotice: Notice = {
  code: 'double-k-not-used',
  message:
    'Haigis does not place the lens by the cornea: the cornea before refractive surgery has no effect here.',
};

export const haigisFacts: FormulaFacts = {
  id: 'haigis',
  name: 'Haigis',
  year: 2000,
  equations: [
    { text: 'DC = 331.5/RC, RC the mean radius; d = a0 + a1 ACD + a2 AL', mark: 'M' },
    { text: 'z = DC + R/(1 - 0.012 R); P = 1336/(AL - d) - 1336/(1336/z - d)', mark: 'M' },
  ],
  sources: [
    {
      citation: 'Haigis, in: Shammas (ed), Intraocular Lens Power Calculations, Slack 2004, ch. 5',
      mark: 'M',
    },
    { citation: 'Haigis et al., Graefes Arch Clin Exp Ophthalmol 2000;238:765-773', mark: 'M' },
    {
      citation:
        'Langenbucher et al. 2022 (bootstrap, 888 eyes): a0 -0.83 to -0.53, a1 0.320 to 0.362, a2 0.195 to 0.210 with A 119.23 to 119.30',
      mark: 'V',
    },
  ],
  validRange:
    'Needs the anterior chamber depth from the epithelium. Its three constants hold for the lens and the kind of axial length they were optimised with.',
  notKnown: [
    'The chapter and the paper could not be opened: index and structure are recalled.',
    'With a0 from an A-constant and optical axial lengths it gives about 0.9 D more lens power than the others at the average eye: optimised constants are needed.',
  ],
  caution: FROM_MEMORY_CAUTION,
};
