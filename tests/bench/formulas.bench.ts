/**
 * Speed of the numerical core: `npx tsx tests/bench/formulas.bench.ts` or `npm run bench formulas`. The bare
 * arithmetic of the same closed form, measured in the same run, is what a prediction is compared with.
 */
import { performance } from 'node:perf_hooks';
import { pathToFileURL } from 'node:url';
import {
  defaultSpread,
  formulaIds,
  haigisDefaultsFromAConstant,
  pAcdFromAConstant,
  predictRefraction,
  prepareFormula,
  prepareLanding,
  surgeonFactorFromAConstant,
} from '@/formulas';
import type { EyeGeometry, FormulaId, LensConstants } from '@/formulas';
import type { BenchRow } from './bench-row';

const A_CONSTANT = 118.9;
const POWERS = 61;
const ROUNDS = 200;
const CALLS = 200_000;

const eye: EyeGeometry = {
  axialLengthMm: 23.49,
  flatRadiusMm: 7.74,
  steepRadiusMm: 7.58,
  anteriorChamberDepthMm: 3.1,
};
const constants: Record<FormulaId, LensConstants> = {
  srkt: { aConstant: A_CONSTANT },
  t2: { aConstant: A_CONSTANT },
  holladay1: { surgeonFactorMm: surgeonFactorFromAConstant(A_CONSTANT) },
  hofferQ: { pAcdMm: pAcdFromAConstant(A_CONSTANT) },
  haigis: haigisDefaultsFromAConstant(A_CONSTANT),
};
const powersD = Array.from({ length: POWERS }, (_, step) => 5 + step / 2);
/** Every measured loop adds to it, so that none can be left out as useless. */
let kept = 0;

export function benchFormulas(): BenchRow[] {
  const bareNs = nsPerCall(bareRefractionD);
  const prepared = prepareFormula('srkt', eye, constants.srkt);
  const preparedNs = nsPerCall((powerD) => prepared.refractionAt(powerD));
  const doorNs = nsPerCall((powerD) => predictRefraction('srkt', eye, powerD, constants.srkt).refractionD);
  return [
    {
      name: 'Candidate table, 5 formulas x 61 powers',
      value: medianMs(candidateTable),
      unit: 'ms',
      aim: '< 1',
    },
    { name: 'Landings of one formula, 61 powers', value: medianMs(landingTable), unit: 'ms', aim: '< 1' },
    { name: 'Predicted refraction, eye prepared', value: preparedNs, unit: 'ns' },
    { name: 'Predicted refraction through the door', value: doorNs, unit: 'ns' },
    { name: 'Bare closed form, eye prepared', value: bareNs, unit: 'ns' },
    { name: 'Prepared prediction over bare closed form', value: preparedNs / bareNs, unit: 'x', aim: '< 5' },
  ];
}

function candidateTable(): void {
  for (const formula of formulaIds) {
    const prepared = prepareFormula(formula, eye, constants[formula]);
    for (const powerD of powersD) kept += prepared.refractionAt(powerD);
  }
}

function landingTable(): void {
  const spread = defaultSpread('optical');
  const prepared = prepareLanding({ formula: 'srkt', eye, constants: constants.srkt, spread });
  for (const powerD of powersD) kept += prepared.at(powerD).chanceWithin(0, 0.5);
}

/** SRK/T's vergence part with this eye's numbers, as a line of C would have it. */
function bareRefractionD(powerD: number): number {
  const vergenceD = 1336 / 18.2 - powerD;
  const cornealD = vergenceD / (1 + 0.0041 * vergenceD) - 43.5;
  return cornealD / (1 + 0.012 * cornealD);
}

function medianMs(work: () => void): number {
  const times: number[] = [];
  for (let round = 0; round < ROUNDS; round += 1) {
    const start = performance.now();
    work();
    times.push(performance.now() - start);
  }
  times.sort((first, second) => first - second);
  return times[ROUNDS / 2] ?? NaN;
}

function nsPerCall(predict: (powerD: number) => number): number {
  const round = () => {
    for (let call = 0; call < CALLS; call += 1) kept += predict(5 + (call % POWERS) / 2);
  };
  for (let warmUp = 0; warmUp < 5; warmUp += 1) round();
  const times = Array.from({ length: 9 }, () => {
    const start = performance.now();
    round();
    return performance.now() - start;
  }).sort((first, second) => first - second);
  return ((times[4] ?? NaN) * 1e6) / CALLS;
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  for (const row of benchFormulas()) {
    console.log(`${row.name}: ${row.value.toPrecision(3)} ${row.unit}${row.aim ? ` (aim ${row.aim})` : ''}`);
  }
  if (!Number.isFinite(kept)) console.log('The measured sums are not finite.');
}
