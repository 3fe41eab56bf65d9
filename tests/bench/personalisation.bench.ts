/**
 * Speed of personalisation: `npx tsx tests/bench/personalisation.bench.ts`. Cases are invented. The bare prediction of
 * as many eyes, measured in the same run, is what a constant is compared with.
 */
import { performance } from 'node:perf_hooks';
import { pathToFileURL } from 'node:url';
import {
  formulaIds,
  haigisDefaultsFromAConstant,
  pAcdFromAConstant,
  predictRefraction,
  proposeConstant,
  randomFromSeed,
  surgeonFactorFromAConstant,
  zeroMeanErrorConstant,
} from '@/formulas';
import type { FormulaId, LensConstants, OutcomeCase } from '@/formulas';
import type { BenchRow } from './bench-row';

const EYES = 10_000;
const ROUNDS = 5;
const A_CONSTANT = 118.9;

const published: Record<FormulaId, LensConstants> = {
  srkt: { aConstant: A_CONSTANT },
  t2: { aConstant: A_CONSTANT },
  holladay1: { surgeonFactorMm: surgeonFactorFromAConstant(A_CONSTANT) },
  hofferQ: { pAcdMm: pAcdFromAConstant(A_CONSTANT) },
  haigis: haigisDefaultsFromAConstant(A_CONSTANT),
};

export function benchPersonalisation(): BenchRow[] {
  const cases = inventedCases();
  const bareMs = medianMs(() => {
    let sum = 0;
    for (const formula of formulaIds) {
      for (const { eye, powerD } of cases) {
        sum += predictRefraction(formula, eye, powerD, published[formula]).refractionD;
      }
    }
    return sum;
  });
  const zeroMs = medianMs(() => {
    let sum = 0;
    for (const formula of formulaIds) {
      const question = { formula, cases, origin: 'optical', published: published[formula] } as const;
      sum += zeroMeanErrorConstant(question).value;
    }
    return sum;
  });
  const proposeMs = medianMs(() => {
    const question = { formula: 'srkt', cases, origin: 'optical', published: published.srkt } as const;
    return proposeConstant(question).shrunk.value;
  });
  return [
    { name: 'Zero 10,000 eyes, 5 formulas', value: zeroMs, unit: 'ms', aim: '< 500' },
    { name: 'Zero over predicting the same eyes once', value: zeroMs / bareMs, unit: 'x' },
    { name: 'Whole proposal of one formula, 10,000 eyes', value: proposeMs, unit: 'ms' },
  ];
}

function inventedCases(): OutcomeCase[] {
  const random = randomFromSeed(1);
  return Array.from({ length: EYES }, (_, index) => {
    const axialLengthMm = Math.min(29, Math.max(20.5, 23.6 + 1.1 * random.normal()));
    const radiusMm = Math.min(8.6, Math.max(7, 7.72 + 0.25 * random.normal()));
    const anteriorChamberDepthMm = Math.min(4.4, Math.max(2.1, 3.1 + 0.35 * random.normal()));
    const eye = {
      axialLengthMm,
      flatRadiusMm: radiusMm + 0.08,
      steepRadiusMm: radiusMm - 0.08,
      anteriorChamberDepthMm,
    };
    const powerD = Math.round(2 * (21 - 2.5 * (axialLengthMm - 23.6))) / 2;
    const predictedD = predictRefraction('srkt', eye, powerD, { aConstant: 119.1 }).refractionD;
    return {
      eye,
      powerD,
      achievedD: predictedD + 0.4 * random.normal(),
      origin: 'optical',
      patient: `patient ${Math.floor(index / 2)}`,
    };
  });
}

function medianMs(work: () => number): number {
  const times = Array.from({ length: ROUNDS }, () => {
    const start = performance.now();
    const result = work();
    if (!Number.isFinite(result)) throw new Error('The work gave no number.');
    return performance.now() - start;
  }).sort((first, second) => first - second);
  return times[(ROUNDS - 1) / 2] ?? NaN;
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  for (const row of benchPersonalisation()) {
    console.log(`${row.name}: ${row.value.toPrecision(3)} ${row.unit}${row.aim ? ` (aim ${row.aim})` : ''}`);
  }
}
