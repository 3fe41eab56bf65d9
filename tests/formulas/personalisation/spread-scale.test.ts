/** The spread of landings against what happens to simulated eyes. */
import {
  defaultSpread,
  landing,
  OutOfRangeError,
  powerForRefraction,
  predictRefraction,
  prepareLanding,
  scaledSpread,
  spreadScaleOf,
  TooFewValuesError,
} from '@/formulas';
import { shiftedCornea } from '@/formulas/units/corneal-power';
import { labelToleranceSdD } from '@/formulas/spread/iso-tolerance';
import { anOperatedEye } from '../support/cohorts';
import { averageConstants, averageEye } from '../support/eyes';
import { seededRandom } from '../support/seeded-random';
import type { SeededRandom } from '../support/seeded-random';
import type { EyeGeometry, Spread } from '@/formulas';

const formula = 'haigis';
const constants = averageConstants.haigis;

/** What becomes of a measured eye when every part of the spread is drawn once. */
function achievedD(
  spread: Spread,
  random: SeededRandom,
  asked: { eye: Required<EyeGeometry>; powerD: number },
): number {
  let { eye, powerD } = asked;
  let [positionMm, refractionD] = [0, 0];
  for (const part of spread.parts) {
    const sd = (spread.scale ?? 1) * (part.sd === 'isoTolerance' ? labelToleranceSdD(asked.powerD) : part.sd);
    const off = sd * random.normal();
    if (part.input === 'axialLengthMm') eye = { ...eye, axialLengthMm: eye.axialLengthMm + off };
    if (part.input === 'keratometryD') eye = { ...eye, ...shiftedCornea(eye, off) };
    if (part.input === 'anteriorChamberDepthMm')
      eye = { ...eye, anteriorChamberDepthMm: eye.anteriorChamberDepthMm + off };
    if (part.input === 'lensPowerD') powerD += off;
    if (part.input === 'lensPositionMm') positionMm += off;
    if (part.input === 'refractionD') refractionD += off;
  }
  const placed = { ...(constants as { a0Mm: number; a1: number; a2: number }) };
  placed.a0Mm += positionMm;
  return predictRefraction(formula, eye, powerD, placed).refractionD + refractionD;
}

describe('the chance of landing', () => {
  it('is honest: eyes land as often as they were told, within binomial bounds', () => {
    const random = seededRandom(17);
    const spread = defaultSpread('immersion');
    const bins = Array.from({ length: 10 }, () => ({ told: 0, landed: 0, count: 0 }));
    for (let drawn = 0; drawn < 20_000; drawn += 1) {
      const eye = anOperatedEye(random);
      const powerD =
        Math.round(2 * powerForRefraction(formula, eye, 0, constants).powerD + 3 * random.normal()) / 2;
      const chance = prepareLanding({ formula, eye, constants, spread }).at(powerD).chanceWithin(0, 0.5);
      const bin = bins[Math.min(9, Math.floor(10 * chance))]!;
      bin.told += chance;
      bin.count += 1;
      if (Math.abs(achievedD(spread, random, { eye, powerD })) <= 0.5) bin.landed += 1;
    }
    const filled = bins.filter(({ count }) => count >= 200);

    expect(filled.length).toBeGreaterThanOrEqual(6);
    for (const { told, landed, count } of filled) {
      const chance = told / count;
      // 3.3 standard errors: one bin in a thousand passes by chance; 0.01 for what is not linear.
      const bound = 3.3 * Math.sqrt((chance * (1 - chance)) / count) + 0.01;
      expect(Math.abs(landed / count - chance)).toBeLessThan(bound);
    }
  });
});

describe('the spread scale', () => {
  const outcomes = (factor: number, count: number, seed = 5, offsetD = 0) => {
    const random = seededRandom(seed);
    return Array.from({ length: count }, () => {
      const predictedSdD = 0.35 + 0.2 * random.uniform();
      return { predictedSdD, errorD: offsetD + factor * predictedSdD * random.normal() };
    });
  };

  it('finds by how much landings scatter more than predicted', () => {
    const { factor, ownFactor, weightOfOwn, caseCount } = spreadScaleOf(outcomes(1.3, 2000));

    expect(ownFactor).toBeCloseTo(1.3, 1);
    expect(factor).toBeCloseTo(1.3, 1);
    expect(weightOfOwn).toBeGreaterThan(0.98);
    expect(caseCount).toBe(2000);
  });

  it('stays near 1 for few cases, and gives own results at least half from 31 on', () => {
    const few = spreadScaleOf(outcomes(2, 5));

    expect(few.factor).toBeLessThan(1 + 0.3 * (few.ownFactor - 1));
    expect(few.factor).toBeGreaterThan(1);
    expect(spreadScaleOf(outcomes(1, 31)).weightOfOwn).toBe(0.5);
    expect(spreadScaleOf(outcomes(1, 30)).weightOfOwn).toBeLessThan(0.5);
  });

  it('blends variances: ((n - 1) own² + 30)/(n - 1 + 30)', () => {
    const { factor, ownFactor } = spreadScaleOf(outcomes(0.8, 11));

    expect(factor).toBeCloseTo(Math.sqrt((10 * ownFactor ** 2 + 30) / 40), 12);
  });

  it('does not take a common offset for spread', () => {
    const shifted = spreadScaleOf(outcomes(1, 3000, 6, 0.5));

    expect(shifted.ownFactor).toBeLessThan(1.05);
  });

  it('holds the true factor in its interval', () => {
    let held = 0;
    for (let cohort = 0; cohort < 300; cohort += 1) {
      const { interval } = spreadScaleOf(outcomes(1.05, 100, 100 + cohort));
      if (interval.low <= 1.05 && interval.high >= 1.05) held += 1;
    }

    expect(held / 300).toBeGreaterThan(0.93);
  });

  it('makes a landing wider by the factor and nothing else', () => {
    const question = { formula, eye: averageEye, powerD: 21, constants } as const;
    const spread = defaultSpread('optical');
    const plain = landing({ ...question, spread });
    const wider = landing({ ...question, spread: scaledSpread(scaledSpread(spread, 1.5), 0.8) });

    expect(wider.meanD).toBe(plain.meanD);
    expect(wider.sdD).toBeCloseTo(1.2 * plain.sdD, 12);
    wider.parts.forEach(({ sdD }, index) => expect(sdD).toBeCloseTo(1.2 * plain.parts[index]!.sdD, 12));
    expect(wider.chanceWithin(plain.meanD, 0.5)).toBeLessThan(plain.chanceWithin(plain.meanD, 0.5));
  });

  it('makes landings honest again for a practice that scatters more', () => {
    const random = seededRandom(23);
    const spread = defaultSpread('optical');
    const truth = { ...spread, scale: 1.4 };
    const eyes = Array.from({ length: 12_000 }, () => {
      const eye = anOperatedEye(random);
      const powerD = powerForRefraction(formula, eye, 0, constants).powerD;
      const errorD = achievedD(truth, random, { eye, powerD });
      return { eye, powerD, errorD, predictedSdD: landing({ formula, eye, powerD, constants, spread }).sdD };
    });
    const own = scaledSpread(spread, spreadScaleOf(eyes.slice(0, 6000)).factor);
    const judged = eyes.slice(6000);
    const told = (by: Spread) =>
      judged.reduce(
        (sum, { eye, powerD }) =>
          sum + landing({ formula, eye, powerD, constants, spread: by }).chanceWithin(0, 0.5),
        0,
      ) / judged.length;
    const landed = judged.filter(({ errorD }) => Math.abs(errorD) <= 0.5).length / judged.length;

    expect(Math.abs(told(own) - landed)).toBeLessThan(0.025);
    expect(told(spread) - landed).toBeGreaterThan(0.08);
  });

  it('refuses too few outcomes, predictions without spread and absurd factors', () => {
    expect(() => spreadScaleOf(outcomes(1, 1))).toThrow(TooFewValuesError);
    expect(() => spreadScaleOf([{ errorD: 0.1, predictedSdD: 0 }])).toThrow(OutOfRangeError);
    expect(() =>
      landing({
        formula,
        eye: averageEye,
        powerD: 21,
        constants,
        spread: { ...defaultSpread('optical'), scale: 0 },
      }),
    ).toThrow(OutOfRangeError);
  });
});
