import {
  casesNeeded,
  casesToReview,
  gateOf,
  groupByAxialLength,
  mayAdopt,
  OutOfRangeError,
  outOfSampleEffect,
  proposeConstant,
  shrinkToPublished,
  TooFewValuesError,
  tripleGateOf,
  UnequalLengthsError,
  zeroMeanErrorConstant,
} from '@/formulas';
import { sampleSd } from '@/formulas/statistics/mean-and-deviation';
import { simulatedCases } from '../support/cohorts';
import { averageConstants } from '../support/eyes';
import { seededRandom } from '../support/seeded-random';

const questionOf = (seed: number, count: number, aConstant = 119.3) =>
  ({
    formula: 'srkt',
    cases: simulatedCases({ formula: 'srkt', count, random: seededRandom(seed), constants: { aConstant } }),
    origin: 'optical',
    published: averageConstants.srkt,
  }) as const;

describe('the gates', () => {
  it.each([
    [0, 'show only', false],
    [19, 'show only', false],
    [20, 'provisional', false],
    [49, 'provisional', false],
    [50, 'suggest', true],
    [99, 'suggest', true],
    [100, 'recommend', true],
    [5000, 'recommend', true],
  ] as const)('%d cases: %s', (count, gate, isAdoptable) => {
    expect(gateOf(count)).toBe(gate);
    expect(mayAdopt(gateOf(count))).toBe(isAdoptable);
  });

  it('three constants need 250 eyes and a spread of lengths', () => {
    const lengths = (count: number, spanMm: number) =>
      Array.from({ length: count }, (_, at) => 23 + (spanMm * at) / (count - 1) / 0.9);

    expect(tripleGateOf(lengths(250, 3.01))).toMatchObject({ isOpen: true, caseCount: 250 });
    expect(tripleGateOf(lengths(250, 3.01)).axialLengthSpanMm).toBeCloseTo(3.01, 10);
    expect(tripleGateOf(lengths(249, 3.01)).isOpen).toBe(false);
    expect(tripleGateOf(lengths(250, 2.99)).isOpen).toBe(false);
    expect(() => tripleGateOf([])).toThrow(TooFewValuesError);
  });

  it('refuse what is no count', () => {
    expect(() => gateOf(-1)).toThrow(OutOfRangeError);
    expect(() => gateOf(20.5)).toThrow(OutOfRangeError);
  });
});

describe('cases needed', () => {
  it.each([
    [0.44, 0.1, 75],
    [0.44, 0.05, 298],
    [0.38, 0.1, 56],
  ])('SD %d D to ± %d D: %d eyes', (sdD, halfWidthD, total) => {
    expect(casesNeeded({ sdD, caseCount: 30, halfWidthD })).toEqual({
      total,
      missing: total - 30,
      halfWidthD,
    });
  });

  it('are none once reached, and more where eyes are related', () => {
    expect(casesNeeded({ sdD: 0.44, caseCount: 80 })).toEqual({ total: 75, missing: 0, halfWidthD: 0.1 });
    expect(casesNeeded({ sdD: 0.44, caseCount: 0, designEffect: 1.5 }).total).toBe(112);
  });

  it('refuse a deviation that is not positive', () => {
    expect(() => casesNeeded({ sdD: 0, caseCount: 3 })).toThrow(OutOfRangeError);
    expect(() => casesNeeded({ sdD: 0.4, caseCount: 3, halfWidthD: 0 })).toThrow(OutOfRangeError);
  });
});

describe('errors by axial length', () => {
  it('put the edges where they say', () => {
    const axialLengthsMm = [21.99, 22, 24.5, 24.51, 26, 26.01, 20];
    const errorsD = [1, 2, 3, 4, 5, 6, 7];
    const groups = groupByAxialLength({ errorsD, axialLengthsMm, clusters: [1, 2, 3, 4, 5, 6, 7] });

    expect(groups.map(({ aboveMm, upToMm, count }) => [aboveMm, upToMm, count])).toEqual([
      [undefined, 22, 2],
      [22, 24.5, 2],
      [24.5, 26, 2],
      [26, undefined, 1],
    ]);
    expect(groups.map(({ summary }) => summary?.meanD ?? null)).toEqual([4, 2.5, 4.5, null]);
  });

  it('give no summary for the two eyes of one patient', () => {
    const groups = groupByAxialLength({ errorsD: [1, 2], axialLengthsMm: [23, 23], clusters: ['a', 'a'] });

    expect(groups[1]).toMatchObject({ count: 2, summary: null });
  });

  it('refuse lists that do not match', () => {
    expect(() => groupByAxialLength({ errorsD: [1], axialLengthsMm: [23, 24], clusters: [1] })).toThrow(
      UnequalLengthsError,
    );
  });
});

describe('cases to review', () => {
  it('are those beyond 2 D, whatever the others do', () => {
    expect(casesToReview([0.1, -2.01, 2])).toEqual([
      { caseIndex: 1, errorD: -2.01, reasons: ['beyond 2 D'] },
    ]);
    expect(casesToReview([2.5])).toEqual([{ caseIndex: 0, errorD: 2.5, reasons: ['beyond 2 D'] }]);
    expect(casesToReview([])).toEqual([]);
  });

  it('and those beyond three deviations about the mean', () => {
    const even = Array.from({ length: 40 }, (_, at) => 0.5 + (at % 2 ? 0.1 : -0.1));
    const list = [...even, 1.4];
    const limit = 3 * sampleSd(list);

    expect(casesToReview(list)).toEqual([{ caseIndex: 40, errorD: 1.4, reasons: ['beyond 3 SD'] }]);
    expect(1.4 - 0.52).toBeGreaterThan(limit);
    expect(casesToReview([...even, 0.9])[0]?.caseIndex).toBe(40);
    expect(casesToReview([...even, 0.8])).toEqual([]);
  });
});

describe('the out-of-sample effect', () => {
  it('finds the gain of a constant that was off', () => {
    const effect = outOfSampleEffect(questionOf(1, 120));

    expect(effect.before.meanD).toBeGreaterThan(0.25);
    expect(Math.abs(effect.after.meanD)).toBeLessThan(0.03);
    expect(effect.gain.meanAbsoluteD).toBeCloseTo(
      effect.before.meanAbsoluteD - effect.after.meanAbsoluteD,
      12,
    );
    expect(effect.gain.interval.low).toBeGreaterThan(0);
    expect(effect.foldCount).toBe(10);
  });

  it('finds none where the constant was right', () => {
    const { gain } = outOfSampleEffect(questionOf(2, 120, 118.9));

    expect(gain.interval.low).toBeLessThan(0);
    expect(gain.meanAbsoluteD).toBeLessThan(0.01);
  });

  it('scatters a little more than in sample, as a fit does on eyes it has not seen', () => {
    const question = questionOf(3, 40);
    const inSample = zeroMeanErrorConstant(question);
    const { after, errorsAfterD } = outOfSampleEffect({ ...question, priorSdD: 5 });

    expect(after.sdD).toBeGreaterThan(inSample.sdD);
    expect(after.sdD).toBeLessThan(1.1 * inSample.sdD);
    expect(errorsAfterD).toHaveLength(40);
  });

  it('is the same for the same seed', () => {
    const question = questionOf(4, 60);

    expect(outOfSampleEffect(question)).toEqual(outOfSampleEffect({ ...question, seed: 1 }));
    expect(outOfSampleEffect({ ...question, seed: 2 }).errorsAfterD).not.toEqual(
      outOfSampleEffect(question).errorsAfterD,
    );
  });

  it('does not see the case that it judges', () => {
    const question = questionOf(5, 40);
    const spoilt = question.cases.map((one, index) =>
      index === 7 ? { ...one, achievedD: one.achievedD + 3 } : one,
    );
    const before = outOfSampleEffect(question).errorsAfterD[7]!;
    const after = outOfSampleEffect({ ...question, cases: spoilt }).errorsAfterD[7]!;

    expect(after - before).toBeCloseTo(3, 9);
  });

  it('needs as many patients as folds', () => {
    expect(() => outOfSampleEffect(questionOf(6, 9))).toThrow(TooFewValuesError);
  });
});

describe('a proposal', () => {
  it('agrees with its parts', () => {
    const question = questionOf(7, 80);
    const proposal = proposeConstant(question);
    const zeroed = zeroMeanErrorConstant(question);

    expect(proposal.gate).toBe('suggest');
    expect(proposal.zeroed).toEqual(zeroed);
    expect(proposal.shrunk).toEqual(shrinkToPublished(zeroed));
    expect(proposal.outOfSample).toEqual(outOfSampleEffect(question));
    expect(proposal.byAxialLength.reduce((sum, { count }) => sum + count, 0)).toBe(80);
    expect(proposal.untilTenth.missing).toBe(Math.max(0, proposal.untilTenth.total - 80));
  });

  it('of few cases is shown without an effect, and names the wild ones', () => {
    const question = questionOf(8, 12);
    const cases = question.cases.map((one, index) =>
      index === 5 ? { ...one, achievedD: one.achievedD + 4 } : one,
    );
    const proposal = proposeConstant({ ...question, cases });

    expect(proposal.gate).toBe('show only');
    expect(proposal.outOfSample).toBeNull();
    expect(proposal.toReview.map(({ caseIndex }) => caseIndex)).toEqual([5]);
    expect(proposal.zeroed.caseCount).toBe(12);
  });

  it('judges prior and scatter as told', () => {
    const question = questionOf(9, 30);
    const timid = proposeConstant({ ...question, priorSdD: 0.05 });

    expect(timid.shrunk.weightOfOwn).toBeLessThan(proposeConstant(question).shrunk.weightOfOwn);
    expect(Math.abs(timid.outOfSample!.after.meanD)).toBeGreaterThan(
      Math.abs(proposeConstant(question).outOfSample!.after.meanD),
    );
  });
});
