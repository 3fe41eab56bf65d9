import * as fc from 'fast-check';
import { availablePowers, powersAround } from '@/shared/clinical/candidate-powers';

const HALF_STEPS = [{ fromD: 5, toD: 35, stepD: 0.5 }];
const around = (exactPowerD: number, ranges = HALF_STEPS, chosenPowerD: number | null = null) =>
  powersAround({ exactPowerD, ranges, chosenPowerD });

describe('the powers of a model', () => {
  it('join ranges of different steps, each power once', () => {
    expect(
      availablePowers([
        { fromD: 6, toD: 10, stepD: 1 },
        { fromD: 10, toD: 11, stepD: 0.5 },
        { fromD: 0.1, toD: 0.4, stepD: 0.1 },
      ]),
    ).toEqual([0.1, 0.2, 0.3, 0.4, 6, 7, 8, 9, 10, 10.5, 11]);
  });

  it('never write a negative zero', () => {
    const zero = availablePowers([{ fromD: -1, toD: 1, stepD: 0.5 }])[2] ?? NaN;

    expect(Object.is(zero, 0)).toBe(true);
  });
});

describe('the powers worth a row', () => {
  it('reach 2.5 D to either side, from higher to lower', () => {
    expect(around(21.3).powersD).toEqual([23.5, 23, 22.5, 22, 21.5, 21, 20.5, 20, 19.5, 19]);
    expect(around(21.5).powersD).toEqual([24, 23.5, 23, 22.5, 22, 21.5, 21, 20.5, 20, 19.5, 19]);
  });

  it('are at most twelve where steps are fine, at least eight where they are coarse', () => {
    expect(around(21.3, [{ fromD: 5, toD: 35, stepD: 0.25 }]).powersD).toHaveLength(12);
    expect(around(21.3, [{ fromD: 5, toD: 35, stepD: 1 }]).powersD).toEqual([25, 24, 23, 22, 21, 20, 19, 18]);
  });

  it('are the nearest ones at the end of what is made, and say so', () => {
    expect(around(36.2)).toEqual({ powersD: [35, 34.5, 34, 33.5], beyond: 'above' });
    expect(around(1)).toEqual({ powersD: [6.5, 6, 5.5, 5], beyond: 'below' });
    expect(around(35).beyond).toBeNull();
    expect(around(5).beyond).toBeNull();
  });

  it('include a power that was chosen before, however far', () => {
    expect(around(21.3, HALF_STEPS, 30).powersD[0]).toBe(30);
    expect(around(21.3, HALF_STEPS, 30.1).powersD[0]).toBe(23.5);
  });

  it('always bracket the exact power, falling, each once', () => {
    const range = fc
      .tuple(
        fc.integer({ min: -10, max: 30 }),
        fc.integer({ min: 1, max: 60 }),
        fc.constantFrom(0.25, 0.5, 1),
      )
      .map(([fromD, steps, stepD]) => ({ fromD, toD: fromD + steps * stepD, stepD }));
    fc.assert(
      fc.property(
        fc.array(range, { minLength: 1, maxLength: 4 }),
        fc.double({ min: -15, max: 60, noNaN: true }),
        (ranges, exactPowerD) => {
          const { powersD, beyond } = around(exactPowerD, ranges);
          const all = availablePowers(ranges);
          const below = all.filter((powerD) => powerD <= exactPowerD).at(-1);
          const above = all.find((powerD) => powerD > exactPowerD);

          expect(powersD).toEqual([...new Set(powersD)].sort((a, b) => b - a));
          for (const bracket of [below, above]) if (bracket !== undefined) expect(powersD).toContain(bracket);
          expect(beyond).toBe(
            below === undefined ? 'below' : above === undefined && below < exactPowerD ? 'above' : null,
          );
          expect(powersD.length).toBeLessThanOrEqual(12);
        },
      ),
    );
  });
});
