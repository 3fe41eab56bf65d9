/** What holds for every eye, lens and target. */
import * as fc from 'fast-check';
import { formulaIds } from '@/formulas';
import { availablePowers } from '@/shared/clinical/candidate-powers';
import { calculatePlan } from '@/shared/clinical/plan-calculation';
import type { MeasurementValues } from '@/shared/contract';
import { aMeasurement, anEye, radiusOf } from './support/eyes';
import { aLensModel, constantsFor } from './support/lenses';
import { aPlanQuestion, calculate, modelOf, theModel } from './support/plans';

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const values: fc.Arbitrary<Partial<MeasurementValues>> = fc.record({
  axialLengthMm: between(19, 33),
  flatRadiusMm: between(radiusOf(46), radiusOf(38)),
  steepRadiusMm: between(radiusOf(50), radiusOf(46)),
  acdMm: between(1.6, 5),
  lensThicknessMm: fc.option(between(3, 6.5)),
  method: fc.constantFrom('optical' as const, 'immersion' as const, 'contact' as const),
});
const input = fc.record({
  targetD: between(-6, 3),
  toleranceD: fc.constantFrom(0.25 as const, 0.5 as const, 0.75 as const, 1 as const),
});
const range = fc
  .tuple(fc.integer({ min: -5, max: 30 }), fc.integer({ min: 0, max: 30 }), fc.constantFrom(0.25, 0.5, 1))
  .map(([fromD, steps, stepD]) => ({ fromD, toD: fromD + steps * stepD, stepD }));
const lens = fc
  .tuple(fc.array(range, { minLength: 1, maxLength: 3 }), between(114, 120))
  .map(([powerRanges, aConstant]) =>
    aLensModel({
      powerRanges,
      constants: [...constantsFor('optical', aConstant), ...constantsFor('ultrasound', aConstant - 0.4)],
    }),
  );

describe('for every eye', () => {
  it('candidates fall in power, are made by the model, and hold chances between 0 and 1', () => {
    fc.assert(
      fc.property(values, input, lens, (given, decisions, model) => {
        const { candidates } = theModel({ values: given, input: decisions, lenses: [model] });
        const powers = candidates.map(({ powerD }) => powerD);
        const made = availablePowers(model.powerRanges);

        expect(powers).toEqual([...powers].sort((a, b) => b - a));
        for (const powerD of powers) expect(made).toContain(powerD);
        for (const { landing, lowestD, highestD, predictions } of candidates) {
          expect(landing.chance).toBeGreaterThanOrEqual(0);
          expect(landing.chance).toBeLessThanOrEqual(1);
          expect(landing.sdD).toBeGreaterThan(0);
          for (const { refractionD } of predictions) {
            expect(refractionD).toBeGreaterThanOrEqual(lowestD);
            expect(refractionD).toBeLessThanOrEqual(highestD);
          }
          expect(landing.meanD).toBeGreaterThanOrEqual(lowestD - 1e-9);
          expect(landing.meanD).toBeLessThanOrEqual(highestD + 1e-9);
        }
      }),
    );
  });

  it('one candidate is the closest, and no power that is made has a better chance', () => {
    fc.assert(
      fc.property(values, input, lens, (given, decisions, model) => {
        const question = { values: given, input: decisions, lenses: [model] };
        const { candidates } = theModel(question);
        const closest = candidates.filter(({ isClosest }) => isClosest);
        const chances = availablePowers(model.powerRanges).map((powerD) => {
          const chosen = theModel({ ...question, choice: { lensId: model.id, powerD } });
          return chosen.candidates.find((candidate) => candidate.powerD === powerD)?.landing.chance ?? NaN;
        });

        expect(closest).toHaveLength(1);
        expect(closest[0]?.landing.chance).toBe(Math.max(...chances));
      }),
      { numRuns: 40 },
    );
  });

  it('a missing chamber depth silences Haigis, and changes nothing for the others', () => {
    fc.assert(
      fc.property(values, input, lens, (given, decisions, model) => {
        const whole = theModel({ values: given, input: decisions, lenses: [model] });
        const without = theModel({
          values: { ...given, acdMm: null, acdFrom: null },
          input: decisions,
          lenses: [model],
        });
        const others = formulaIds.filter((formula) => formula !== 'haigis');

        expect(whole.silenced).toEqual([]);
        expect(without.silenced.map(({ formula }) => formula)).toEqual(['haigis']);
        expect(without.exactPowers.map(({ formula }) => formula)).toEqual(others);
        expect(without.exactPowers).toEqual(whole.exactPowers.filter(({ formula }) => formula !== 'haigis'));
      }),
    );
  });

  it('right and left are calculated alike', () => {
    fc.assert(
      fc.property(values, input, (given, decisions) => {
        const right = aPlanQuestion({ values: given, input: decisions });
        const left = {
          ...right,
          eye: anEye({}, 'left'),
          measurement: aMeasurement(right.measurement.values, 'left'),
        };

        expect(calculatePlan(left)).toEqual(calculatePlan(right));
      }),
    );
  });

  it('flat and steep meridians may change places', () => {
    fc.assert(
      fc.property(values, input, (given, decisions) => {
        const turned = { ...given, flatRadiusMm: given.steepRadiusMm, steepRadiusMm: given.flatRadiusMm };

        const exact = (one: Partial<MeasurementValues>) =>
          theModel({ values: one, input: decisions }).exactPowers;
        expect(exact(turned).map(({ powerD }) => powerD.toFixed(9))).toEqual(
          exact(given).map(({ powerD }) => powerD.toFixed(9)),
        );
      }),
    );
  });

  it('a wider tolerance never lowers a chance', () => {
    fc.assert(
      fc.property(values, between(-3, 0), (given, targetD) => {
        const chances = (toleranceD: 0.25 | 0.5 | 0.75 | 1) =>
          theModel({ values: given, input: { targetD, toleranceD } }).candidates.map(
            ({ landing }) => landing.chance,
          );
        const [narrow, wide] = [chances(0.5), chances(0.75)];

        narrow.forEach((chance, index) => expect(wide[index]).toBeGreaterThanOrEqual(chance));
      }),
    );
  });

  it('the same question has the same answer, to the last bit', () => {
    fc.assert(
      fc.property(values, input, lens, (given, decisions, model) => {
        const once = () => JSON.stringify(calculate({ values: given, input: decisions, lenses: [model] }));

        expect(once()).toBe(once());
      }),
    );
  });

  it('no number of a calculation is lost on its way through JSON', () => {
    fc.assert(
      fc.property(values, input, lens, (given, decisions, model) => {
        const calculation = calculate({ values: given, input: decisions, lenses: [model] });

        expect(JSON.parse(JSON.stringify(calculation))).toEqual(calculation);
        expect(modelOf(calculation).lensId).toBe(model.id);
      }),
    );
  });
});
