import { prepareFormula, radiusMmFromKeratometryD } from '@/formulas';
import type { DemoCase } from '@/server/db/seeds/demo-case';
import { demoCohort } from '@/server/db/seeds/demo-cohort';
import { clinicDay, clinicMoment } from '@/server/db/seeds/demo-days';
import { templateRow, typedMeasurement, withRadii, type DemoEye } from '@/server/db/seeds/demo-eye';
import { NOT_MEASURED_YET } from '@/server/db/seeds/demo-unmeasured';
import { readMeasurement, readPatient, SIDES, type MeasurementValues, type Side } from '@/shared/contract';

const TODAY = '2026-03-02';
const cohort = demoCohort();

interface Measured {
  one: DemoCase;
  side: Side;
  eye: DemoEye;
}
/** All eyes as measured first. */
const measured: Measured[] = cohort.flatMap((one) =>
  SIDES.flatMap((side) => (one[side] === null ? [] : [{ one, side, eye: one[side] }])),
);
const remeasured: Measured[] = cohort.flatMap((one) =>
  (one.again ?? []).map(({ side, eye }) => ({ one, side, eye })),
);

const valuesOf = ({ one, side, eye }: Measured): MeasurementValues => {
  const text = typedMeasurement(templateRow(one.person, side, { eye, today: TODAY }));
  const reading = readMeasurement(text, { today: TODAY, birthDate: one.person.born });
  if ('problems' in reading) throw new Error(`${one.person.record}: ${JSON.stringify(reading.problems)}`);
  return reading.values;
};
const meanKD = ({ flatKD, steepKD }: DemoEye): number => (flatKD + steepKD) / 2;
const cylinderD = ({ flatKD, steepKD }: DemoEye): number => steepKD - flatKD;
const someEye = (is: (eye: DemoEye, of: DemoCase, side: Side) => boolean): boolean =>
  measured.some(({ eye, one, side }) => is(eye, one, side));
const historyOf = (one: DemoCase, side: Side) => one.history?.[side] ?? {};

describe('the people of the demonstration', () => {
  it('are about forty, each with a record number and a name of their own, all readable', () => {
    const people = [...cohort.map(({ person }) => person), ...NOT_MEASURED_YET];

    expect(people.length).toBeGreaterThanOrEqual(40);
    expect(new Set(people.map(({ record }) => record)).size).toBe(people.length);
    expect(new Set(people.map(({ family, given }) => `${family} ${given}`)).size).toBe(people.length);
    for (const { record, family, given, born, sex } of people) {
      const text = { recordNumber: record, familyName: family, givenName: given, birthDate: born, sex };
      expect(readPatient(text, { today: TODAY })).toHaveProperty('values');
      expect(record).toMatch(/^D-\d{4}$/);
    }
    expect(cohort.every(({ story }) => story.length > 0)).toBe(true);
  });

  it('are born mostly from 1935 to 1965, a few later', () => {
    const years = cohort.map(({ person }) => Number(person.born.slice(0, 4)));
    const late = years.filter((year) => year > 1965);

    expect(Math.min(...years)).toBeGreaterThanOrEqual(1935);
    expect(late.length).toBeGreaterThanOrEqual(2);
    expect(late.length).toBeLessThanOrEqual(5);
  });

  it('are the same every time', () => {
    expect(demoCohort()).toEqual(cohort);
  });
});

describe('every eye', () => {
  it.each([...measured, ...remeasured].map((one) => [`${one.one.person.record} ${one.side}`, one] as const))(
    '%s can be imported',
    (_name, one) => {
      const values = valuesOf(one);

      expect(values.axialLengthMm).toBeCloseTo(one.eye.axialLengthMm, 2);
      expect(values.measuredAt < TODAY).toBe(true);
    },
  );

  it('has a fellow that is alike and not the same, except where the case is about that', () => {
    const exceptions = /copy|swollen|oil|differ|swapped|injury|lost|one eye/;
    const pairs = cohort.flatMap((one) =>
      one.right && one.left && !exceptions.test(one.story) ? [[one.right, one.left] as const] : [],
    );

    expect(pairs.length).toBeGreaterThanOrEqual(25);
    for (const [right, left] of pairs) {
      const apartMm = Math.abs(right.axialLengthMm - left.axialLengthMm);
      expect(apartMm).toBeGreaterThan(0);
      expect(apartMm).toBeLessThan(0.7);
      expect(Math.abs(meanKD(right) - meanKD(left))).toBeLessThan(0.9);
      expect([right.flatKD, right.steepKD]).not.toEqual([left.flatKD, left.steepKD]);
    }
  });
});

describe('the cases that a practice meets', () => {
  it.each<[string, (eye: DemoEye, one: DemoCase, side: Side) => boolean]>([
    ['short', ({ axialLengthMm }) => axialLengthMm < 22],
    ['very short', ({ axialLengthMm }) => axialLengthMm < 21],
    ['long', ({ axialLengthMm }) => axialLengthMm > 26.5 && axialLengthMm < 30],
    ['very long', (eye) => eye.axialLengthMm > 30 && (eye.method ?? 'optical') === 'optical'],
    ['steep', (eye) => meanKD(eye) > 47],
    ['flat without surgery', (eye, one, side) => meanKD(eye) < 41 && !historyOf(one, side).cornealSurgery],
    ['steep with the rule', (eye) => cylinderD(eye) > 1.5 && Math.abs(eye.steepAxisDeg - 90) < 15],
    ['steep against the rule', (eye) => cylinderD(eye) > 1.5 && Math.abs(eye.steepAxisDeg - 90) > 75],
    ['steep obliquely', (eye) => cylinderD(eye) > 1.5 && Math.abs(Math.abs(eye.steepAxisDeg - 90) - 45) < 10],
    ['after myopic laser', (_eye, one, side) => historyOf(one, side).cornealSurgeryKind === 'myopic-laser'],
    [
      'after hyperopic laser',
      (_eye, one, side) => historyOf(one, side).cornealSurgeryKind === 'hyperopic-laser',
    ],
    ['without chamber depth', ({ acdMm }) => acdMm === undefined],
    [
      'with the depth from the endothelium and a thickness',
      (eye) => eye.acdFrom === 'endothelium' && eye.cornealThicknessUm !== undefined,
    ],
    [
      'with the depth from the endothelium and no thickness',
      (eye) => eye.acdFrom === 'endothelium' && eye.cornealThicknessUm === undefined,
    ],
    ['whose corneal surgery nobody asked about', (_eye, one, side) => isUnanswered(one, side)],
    ['measured more than two years ago', ({ daysAgo }) => (daysAgo ?? 0) > 731],
    [
      'filled with silicone oil and measured by ultrasound',
      (eye, one, side) =>
        historyOf(one, side).vitreousStatus === 'silicone-oil' && eye.method === 'immersion',
    ],
    [
      'of a young person, swollen',
      (eye, one) => one.person.born > '1985' && (eye.lensThicknessMm ?? 0) > 5 && eye.method === 'immersion',
    ],
  ])('has an eye %s', (_name, is) => {
    expect(someEye(is)).toBe(true);
  });

  it.each(['immersion', 'contact'] as const)(
    'has a swollen lens measured by %s, its fellow optically',
    (method) => {
      const found = measured.some(({ one, side, eye }) => {
        const fellow = one[side === 'right' ? 'left' : 'right'];
        return eye.method === method && isSwollen(eye) && fellow !== null && isThinnerOptical(fellow, eye);
      });

      expect(found).toBe(true);
    },
  );

  it('has an eye for which SRK/T leaves its domain and says so', () => {
    const notices = measured.flatMap(({ eye }) => {
      const cornea = {
        flatRadiusMm: radiusMmFromKeratometryD(eye.flatKD),
        steepRadiusMm: radiusMmFromKeratometryD(eye.steepKD),
      };
      const { axialLengthMm } = eye;
      return prepareFormula('srkt', { axialLengthMm, ...cornea }, { aConstant: 118.9 }).notices;
    });

    expect(notices.map(({ code }) => code)).toContain('srkt-negative-radicand');
  });

  it('has eyes more than 0.70 mm apart, a copy, only eyes, and an eye measured the other way round', () => {
    const pairs = cohort.flatMap(({ right, left }) => (right && left ? [[right, left] as const] : []));
    const isSwapped = (one: DemoCase): boolean => {
      const [right, left] = SIDES.map((side) => one.again?.find((again) => again.side === side)?.eye);
      const isLike = (a: DemoEye | undefined, b: DemoEye | null): boolean =>
        a !== undefined && b !== null && Math.abs(a.axialLengthMm - b.axialLengthMm) < 0.05;
      return isLike(right, one.left) && isLike(left, one.right) && !isLike(right, one.right);
    };

    expect(pairs.some(([right, left]) => Math.abs(right.axialLengthMm - left.axialLengthMm) > 0.7)).toBe(
      true,
    );
    expect(pairs.some(([right, left]) => JSON.stringify(right) === JSON.stringify(left))).toBe(true);
    expect(
      cohort.some(({ left, history }) => left === null && /prosthesis/.test(history?.left?.remarks ?? '')),
    ).toBe(true);
    expect(cohort.some(isSwapped)).toBe(true);
  });
});

describe('the calendar', () => {
  it('counts back from the day, and to Friday from a weekend', () => {
    expect(clinicDay('2026-03-02', 0)).toBe('2026-03-02');
    expect(clinicDay('2026-03-02', 1)).toBe('2026-02-27');
    expect(clinicDay('2026-03-02', 2)).toBe('2026-02-27');
    expect(clinicDay('2026-03-02', 4)).toBe('2026-02-26');
    expect(new Date(clinicMoment('2026-03-02', 4, '16:05')).getHours()).toBe(16);
  });

  it('dates every measurement before its plan, on whatever day it begins', () => {
    for (const today of ['2026-03-02', '2026-03-04', '2026-03-07', '2026-03-08']) {
      for (const one of cohort) {
        for (const side of SIDES) {
          const plan = one.plan?.[side];
          if (!plan) continue;
          const planned = clinicMoment(today, plan.daysAgo, '17:10');
          const first = clinicMoment(today, one[side]?.daysAgo ?? 12, '16:20');
          expect(first < planned).toBe(true);
          expect(planned < new Date(`${today}T00:00:00`).toISOString()).toBe(true);
        }
      }
    }
  });
});

it('writes radii that are the same cornea as the powers', () => {
  const [one] = measured;
  if (!one) throw new Error('nobody is measured');
  const row = templateRow(one.one.person, one.side, { eye: one.eye, today: TODAY });
  const reading = readMeasurement(typedMeasurement(withRadii(row)), { today: TODAY });

  expect(reading).toHaveProperty('values.keratometricIndex', null);
  expect(reading).toHaveProperty('values.flatRadiusMm', Number((337.5 / one.eye.flatKD).toFixed(2)));
});

function isUnanswered(one: DemoCase, side: Side): boolean {
  return one.history?.[side]?.cornealSurgery === null && one[side] !== null;
}

function isSwollen({ lensThicknessMm = 0, acdMm = 9 }: DemoEye): boolean {
  return lensThicknessMm > 5 && acdMm < 2.5;
}

function isThinnerOptical(fellow: DemoEye, { lensThicknessMm = 0 }: DemoEye): boolean {
  return fellow.method === undefined && (fellow.lensThicknessMm ?? 9) < lensThicknessMm - 0.5;
}
