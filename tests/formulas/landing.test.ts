import { jStat } from 'jstat';
import { cumulativeStdNormalProbability } from 'simple-statistics';
import {
  defaultSpread,
  formulaIds,
  landing,
  meanKeratometryD,
  normalCdf,
  powerForRefraction,
  predictRefraction,
  prepareLanding,
  spreadOfOwnResults,
} from '@/formulas';
import { labelToleranceSdD } from '@/formulas/spread/iso-tolerance';
import { anEye, averageConstants, averageEye } from './support/eyes';
import { seededRandom } from './support/seeded-random';
import type {
  AxialLengthMethod,
  DefaultSpreadOptions,
  EyeGeometry,
  FormulaId,
  LensConstants,
} from '@/formulas';

const mean = (values: number[]) => values.reduce((sum, each) => sum + each, 0) / values.length;

describe('the normal distribution', () => {
  it('agrees with two libraries', () => {
    for (let z = -8; z <= 8; z += 0.01) {
      expect(Math.abs(normalCdf(z) - jStat.normal.cdf(z, 0, 1))).toBeLessThan(1e-12);
    }
    for (let z = -3; z <= 3; z += 0.25) {
      expect(Math.abs(normalCdf(z) - cumulativeStdNormalProbability(z))).toBeLessThan(1e-4);
    }
  });

  it.each([
    [0, 0.5],
    [1, 0.841344746068543],
    [1.959963984540054, 0.975],
    [-3, 0.00134989803163009],
    [40, 1],
    [-40, 0],
  ])('up to %d it holds %d', (z, probability) => expect(normalCdf(z)).toBeCloseTo(probability, 14));
});

describe('the chance of landing', () => {
  const question = {
    formula: 'srkt',
    eye: averageEye,
    powerD: 20.5,
    constants: averageConstants.srkt,
    spread: defaultSpread('optical'),
  } as const;

  it('is the normal probability of the band round the target', () => {
    const { meanD, sdD, chanceWithin } = landing(question);
    for (const targetD of [-3, -0.5, 0, 0.25]) {
      for (const toleranceD of [0, 0.25, 0.5, 1, 3]) {
        const expected =
          jStat.normal.cdf(targetD + toleranceD, meanD, sdD) -
          jStat.normal.cdf(targetD - toleranceD, meanD, sdD);

        expect(chanceWithin(targetD, toleranceD)).toBeCloseTo(expected, 12);
      }
    }
  });

  it('centres on the predicted refraction and adds its parts in squares', () => {
    const { meanD, sdD, parts } = landing(question);

    expect(meanD).toBe(predictRefraction('srkt', averageEye, 20.5, question.constants).refractionD);
    expect(sdD).toBeCloseTo(Math.sqrt(parts.reduce((sum, part) => sum + part.sdD ** 2, 0)), 14);
    expect(parts.map(({ source }) => source)).toEqual(question.spread.parts.map(({ source }) => source));
  });

  it('is certain, one way or the other, without any spread', () => {
    const { meanD, sdD, chanceWithin } = landing({ ...question, spread: { parts: [] } });

    expect(sdD).toBe(0);
    expect(chanceWithin(meanD + 0.2, 0.25)).toBe(1);
    expect(chanceWithin(meanD + 0.3, 0.25)).toBe(0);
  });

  it('is the same for one power and for a prepared eye', () => {
    const prepared = prepareLanding(question).at(20.5);
    const single = landing(question);

    expect(prepared.meanD).toBe(single.meanD);
    expect(prepared.parts).toEqual(single.parts);
  });

  it('keeps notices and options of the formula', () => {
    const eye = anEye(28, 43);
    const options = { axialLengthAdjustment: 'wangKoch2018', vertexMm: 14 } as const;

    const result = landing({ ...question, eye, powerD: 12, options });

    expect(result.meanD).toBe(predictRefraction('srkt', eye, 12, question.constants, options).refractionD);
    expect(result.notices.map(({ code }) => code)).toEqual(['axial-length-adjusted']);
  });
});

describe('parts of the spread', () => {
  const partOf = (formula: FormulaId, input: string, eye: EyeGeometry = averageEye) => {
    const spread = defaultSpread('optical');
    const index = spread.parts.findIndex((part) => part.input === input);
    return landing({ formula, eye, powerD: 20.5, constants: averageConstants[formula], spread }).parts[index]!
      .sdD;
  };

  it('the anterior chamber depth acts through Haigis alone', () => {
    for (const formula of formulaIds) {
      const sdD = partOf(formula, 'anteriorChamberDepthMm');
      if (formula === 'haigis') expect(sdD).toBeCloseTo(0.0113, 3);
      else expect(sdD).toBe(0);
    }
  });

  it.each(formulaIds)('axial length and keratometry follow the slope of %s', (formula) => {
    const at = (eye: EyeGeometry) =>
      predictRefraction(formula, eye, 20.5, averageConstants[formula]).refractionD;
    const perMm =
      (at({ ...averageEye, axialLengthMm: 23.491 }) - at({ ...averageEye, axialLengthMm: 23.489 })) / 0.002;
    const perD = (at(anEye(23.49, 44.261)) - at(anEye(23.49, 44.259))) / 0.002;

    expect(partOf(formula, 'axialLengthMm')).toBeCloseTo(Math.abs(perMm) * 0.0177, 4);
    expect(partOf(formula, 'keratometryD')).toBeCloseTo(Math.abs(perD) * 0.18, 4);
  });

  it('a step of a formula does not look like a slope', () => {
    const below = partOf('hofferQ', 'axialLengthMm', anEye(22.9, 44));
    const at = partOf('hofferQ', 'axialLengthMm', anEye(23, 44));
    const spread = defaultSpread('optical');
    const options = { axialLengthAdjustment: 'wangKoch2018' } as const;
    const holladay = (axialLengthMm: number) =>
      landing({
        formula: 'holladay1',
        eye: anEye(axialLengthMm, 43),
        powerD: 15,
        constants: averageConstants.holladay1,
        spread,
        options,
      });

    expect(Math.abs(at - below)).toBeLessThan(0.005);
    // The adjusted line is flatter, 0.817 mm per mm, and so is the spread behind it.
    expect(holladay(26.5001).parts[0]!.sdD / holladay(26.5).parts[0]!.sdD).toBeCloseTo(0.817, 1);
  });

  it('works at the very edge of the hard limits', () => {
    for (const axialLengthMm of [14, 40]) {
      const eye = anEye(axialLengthMm, 43);
      expect(
        landing({
          formula: 't2',
          eye,
          powerD: 10,
          constants: { aConstant: 118.9 },
          spread: defaultSpread('contact'),
        }).sdD,
      ).toBeGreaterThan(0.3);
    }
  });

  it.each([
    [15, 0.3],
    [15.5, 0.4],
    [25, 0.4],
    [25.5, 0.5],
    [30, 0.5],
    [30.5, 1],
    [-5, 0.3],
  ])('a label of %d D may be off by %d D', (powerD, halfWidthD) => {
    expect(labelToleranceSdD(powerD)).toBeCloseTo(halfWidthD / Math.sqrt(3), 14);
  });

  it('lens position and refraction share in the ratio 35 to 27 at the average eye', () => {
    const ratios = formulaIds.map(
      (formula) => partOf(formula, 'lensPositionMm') ** 2 / partOf(formula, 'refractionD') ** 2,
    );

    expect(mean(ratios)).toBeCloseTo(35 / 27, 1);
  });
});

describe('the default spread at the average eye', () => {
  const totals = (method: AxialLengthMethod, options?: DefaultSpreadOptions) =>
    formulaIds.map((formula) => {
      const constants = averageConstants[formula];
      const { powerD } = powerForRefraction(formula, averageEye, 0, constants);
      return landing({ formula, eye: averageEye, powerD, constants, spread: defaultSpread(method, options) })
        .sdD;
    });
  const fromMae = (maeD: number) => maeD * Math.sqrt(Math.PI / 2);

  it.each<[string, number, number[]]>([
    ['optical: An 2019, MAE 0.36', fromMae(0.36), totals('optical')],
    ['immersion: MAE 0.43', fromMae(0.43), totals('immersion')],
    ['contact: MAE 0.53', fromMae(0.53), totals('contact')],
    ['where optical failed: MAE 0.64', fromMae(0.64), totals('contact', { hasOpticalFailed: true })],
    ['after refractive surgery: SD 0.70 to 0.72', 0.71, totals('optical', { hasRefractiveSurgery: true })],
  ])('agrees with the published error (%s)', (_name, publishedD, sds) => {
    expect(Math.abs(mean(sds) - publishedD)).toBeLessThan(0.006);
    for (const sdD of sds) expect(Math.abs(sdD / publishedD - 1)).toBeLessThan(0.07);
  });

  it('SRK/T: SD 0.44 D in 888 eyes', () => expect(totals('optical')[0]).toBeCloseTo(0.44, 2));

  it('is wider the worse the axial length was measured', () => {
    const ladder = [
      totals('optical'),
      totals('immersion'),
      totals('contact'),
      totals('immersion', { hasOpticalFailed: true }),
    ].map(mean);

    expect([...ladder].sort()).toEqual(ladder);
  });

  it('names every part, its figure and where that comes from', () => {
    for (const part of defaultSpread('contact', { hasOpticalFailed: true, hasRefractiveSurgery: true })
      .parts) {
      expect(part.source).not.toBe('');
      expect(part.reference.length).toBeGreaterThan(10);
    }
  });

  it('gives way to own results', () => {
    const spread = spreadOfOwnResults(0.38, 42);

    const result = landing({
      formula: 'srkt',
      eye: averageEye,
      powerD: 20.5,
      constants: { aConstant: 118.9 },
      spread,
    });

    expect(result.sdD).toBe(0.38);
    expect(result.parts).toEqual([{ source: 'Own results in 42 eyes', sdD: 0.38 }]);
  });
});

describe('Monte Carlo', () => {
  const SAMPLES = 40_000;
  /** Moves the lens plane by moving the constant: another way than the landing takes. */
  const movedConstants: Record<FormulaId, (byMm: number) => LensConstants> = {
    srkt: (byMm) => ({ aConstant: 118.9 + byMm / 0.62467 }),
    t2: (byMm) => ({ aConstant: 118.9 + byMm / 0.62467 }),
    holladay1: (byMm) => ({ surgeonFactorMm: 1.733 + byMm }),
    hofferQ: (byMm) => ({ pAcdMm: 5.49 + byMm }),
    haigis: (byMm) => ({ a0Mm: -0.73 + byMm, a1: 0.34, a2: 0.203 }),
  };
  const sdOf: Record<AxialLengthMethod, { axialMm: number; depthMm: number }> = {
    optical: { axialMm: 0.0177, depthMm: 0.0247 },
    immersion: { axialMm: 0.133, depthMm: 0.1 },
    contact: { axialMm: 0.213, depthMm: 0.1 },
  };

  it.each(
    formulaIds.flatMap((formula) => (['optical', 'contact'] as const).map((method) => ({ formula, method }))),
  )('agrees with the propagated spread of $formula, $method', ({ formula, method }) => {
    const random = seededRandom(20240229);
    const eye = { ...anEye(24.1, 42.5, 43.7), anteriorChamberDepthMm: 3.2 };
    const keratometryD = meanKeratometryD(eye);
    const powerD = 19;
    const sampleOnce = () => {
      const shiftD = 0.18 * random.normal();
      const drawn = {
        ...anEye(24.1 + sdOf[method].axialMm * random.normal(), 42.5 + shiftD, 43.7 + shiftD),
        anteriorChamberDepthMm: 3.2 + sdOf[method].depthMm * random.normal(),
      };
      const constants = movedConstants[formula](0.227 * random.normal());
      const labelled = powerD + 0.4 * (2 * random.uniform() - 1);
      return predictRefraction(formula, drawn, labelled, constants).refractionD + 0.258 * random.normal();
    };
    const drawn = Array.from({ length: SAMPLES }, sampleOnce);
    const meanD = mean(drawn);
    const sdD = Math.sqrt(mean(drawn.map((each) => (each - meanD) ** 2)));

    const result = landing({
      formula,
      eye,
      powerD,
      constants: averageConstants[formula],
      spread: defaultSpread(method),
    });

    expect(keratometryD).toBeCloseTo(43.1, 10);
    expect(Math.abs(result.meanD - meanD)).toBeLessThan(0.02);
    expect(Math.abs(result.sdD / sdD - 1)).toBeLessThan(0.02);
    const inBand = drawn.filter((each) => Math.abs(each) <= 0.5).length / SAMPLES;
    expect(Math.abs(result.chanceWithin(0, 0.5) - inBand)).toBeLessThan(0.015);
  });
});
