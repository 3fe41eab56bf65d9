/**
 * The lens catalogue of the demonstration. Every model is invented. Constants agree with each other by the
 * published conversions between formulas (Holladay 1988), and Haigis is set so that it gives an average eye the
 * mean power of the other formulas, as optimised constants do.
 */
import {
  pAcdFromAConstant,
  powerForRefraction,
  predictRefraction,
  surgeonFactorFromAConstant,
} from '@/formulas';
import type { ConstantOrigin, LensConstant, LensInput, PowerRange } from '@/shared/contract';
import { BACKUP_LENS, EVERYDAY_LENS } from './demo-case';

const SOURCE = 'invented for the demonstration';
const MARK = 'Invented model of the demonstration';
const DATED = '2026-01-15';
const AVERAGE_EYE = {
  axialLengthMm: 23.5,
  flatRadiusMm: 7.75,
  steepRadiusMm: 7.6,
  anteriorChamberDepthMm: 3.1,
};
const HAIGIS_SLOPES = { a1: 0.4, a2: 0.1 };
/** An ultrasound length ends at the front of the retina and is shorter: the same lens has a lower constant. */
const ULTRASOUND_SHIFT_A = -0.35;

/** a0 with which Haigis gives the average eye the mean power of the others; found by halving, to 0.0005 mm. */
export function haigisA0Mm(aConstant: number): number {
  const powerD = meanPowerD(aConstant);
  let [lowMm, highMm] = [-4, 4];
  while (highMm - lowMm > 0.0005) {
    const middleMm = (lowMm + highMm) / 2;
    const constants = { a0Mm: middleMm, ...HAIGIS_SLOPES };
    const { refractionD } = predictRefraction('haigis', AVERAGE_EYE, powerD, constants);
    // A deeper lens leaves the eye more farsighted.
    if (refractionD < 0) lowMm = middleMm;
    else highMm = middleMm;
  }
  return round((lowMm + highMm) / 2, 3);
}

/** For emmetropia, of all formulas but Haigis. */
function meanPowerD(aConstant: number): number {
  const powersD = [
    powerForRefraction('srkt', AVERAGE_EYE, 0, { aConstant }),
    powerForRefraction('t2', AVERAGE_EYE, 0, { aConstant }),
    powerForRefraction('holladay1', AVERAGE_EYE, 0, {
      surgeonFactorMm: surgeonFactorFromAConstant(aConstant),
    }),
    powerForRefraction('hofferQ', AVERAGE_EYE, 0, { pAcdMm: pAcdFromAConstant(aConstant) }),
  ].map(({ powerD }) => powerD);
  return powersD.reduce((sum, powerD) => sum + powerD, 0) / powersD.length;
}

const round = (value: number, decimals: number): number => Number(value.toFixed(decimals));

function constantsFor(aConstant: number, origin: ConstantOrigin): LensConstant[] {
  const facts = { origin, source: SOURCE, dated: DATED };
  return [
    { ...facts, formula: 'srkt', values: { aConstant } },
    { ...facts, formula: 't2', values: { aConstant } },
    {
      ...facts,
      formula: 'holladay1',
      values: { surgeonFactorMm: round(surgeonFactorFromAConstant(aConstant), 2) },
    },
    { ...facts, formula: 'hofferQ', values: { pAcdMm: round(pAcdFromAConstant(aConstant), 2) } },
    { ...facts, formula: 'haigis', values: { a0Mm: haigisA0Mm(aConstant), ...HAIGIS_SLOPES } },
  ];
}

const bothOrigins = (aConstant: number): LensConstant[] => [
  ...constantsFor(aConstant, 'optical'),
  ...constantsFor(round(aConstant + ULTRASOUND_SHIFT_A, 2), 'ultrasound'),
];

const USUAL: PowerRange[] = [
  { fromD: 6, toD: 10, stepD: 1 },
  { fromD: 10, toD: 30, stepD: 0.5 },
];
const WIDE: PowerRange[] = [
  { fromD: -5, toD: 10, stepD: 1 },
  { fromD: 10, toD: 30, stepD: 0.5 },
  { fromD: 31, toD: 36, stepD: 1 },
];
const CYLINDERS = [1, 1.5, 2.25, 3, 3.75, 4.5];

type Model = Pick<LensInput, 'name' | 'kind' | 'constants'> & Partial<LensInput>;

const model = ({ remarks, ...facts }: Model): LensInput => ({
  isToric: false,
  design: 'one-piece',
  powerRanges: USUAL,
  cylinderStepsD: [],
  remarks: remarks === undefined ? MARK : `${MARK}: ${remarks}`,
  isRetired: false,
  ...facts,
});
const toric = (facts: Model): LensInput => model({ isToric: true, cylinderStepsD: CYLINDERS, ...facts });

export function demoLenses(): LensInput[] {
  return [
    model({ name: EVERYDAY_LENS, kind: 'monofocal', powerRanges: WIDE, constants: bothOrigins(118.9) }),
    toric({ name: 'Pilot Mono Toric', kind: 'monofocal', constants: bothOrigins(118.9) }),
    model({
      name: BACKUP_LENS,
      kind: 'monofocal',
      design: 'three-piece',
      powerRanges: WIDE,
      constants: bothOrigins(118.6),
      remarks: 'for the bag or the sulcus',
    }),
    model({ name: 'Tern Plus', kind: 'monofocal-plus', constants: bothOrigins(119.1) }),
    toric({ name: 'Tern Plus Toric', kind: 'monofocal-plus', constants: constantsFor(119.1, 'optical') }),
    model({ name: 'Meridian Reach', kind: 'extended-depth-of-focus', constants: bothOrigins(119) }),
    toric({
      name: 'Meridian Reach Toric',
      kind: 'extended-depth-of-focus',
      constants: constantsFor(119, 'optical'),
    }),
    model({ name: 'Lantern Three Distances', kind: 'multifocal', constants: constantsFor(119.2, 'optical') }),
    toric({
      name: 'Lantern Three Distances Toric',
      kind: 'multifocal',
      constants: constantsFor(119.2, 'optical'),
    }),
    model({
      name: 'Harbour Front',
      kind: 'monofocal',
      design: 'anterior-chamber',
      constants: bothOrigins(115.6).filter(({ formula }) => formula === 'srkt' || formula === 't2'),
      remarks: 'anterior chamber; size by white-to-white',
    }),
    model({
      name: 'Skerry High Power',
      kind: 'monofocal',
      powerRanges: [{ fromD: 30, toD: 40, stepD: 1 }],
      constants: bothOrigins(118.7).filter(({ formula }) => formula !== 'haigis'),
    }),
    model({
      name: 'Keel Low Power',
      kind: 'monofocal',
      powerRanges: [
        { fromD: -12, toD: -5, stepD: 1 },
        { fromD: -5, toD: 10, stepD: 0.5 },
      ],
      constants: bothOrigins(118.7),
      remarks: 'for long eyes; minus powers',
    }),
    model({
      name: 'Old Pilot',
      kind: 'monofocal',
      constants: bothOrigins(118.4),
      remarks: 'no longer supplied',
      isRetired: true,
    }),
  ];
}

/** What was recorded of the everyday lens before its constants were corrected: a model has a history. */
export function everydayLensBefore(): LensInput {
  return model({ name: EVERYDAY_LENS, kind: 'monofocal', powerRanges: WIDE, constants: bothOrigins(118.8) });
}
