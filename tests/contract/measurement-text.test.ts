/** The reading of a measurement given as text: what it accepts, what it refuses, and in which words. */
import * as fc from 'fast-check';
import {
  MEASUREMENT_FIELDS,
  measurementEntryRequestSchema,
  measurementEntrySchema,
  measurementTextSchema,
  readMeasurement,
  type MeasurementProblem,
  type MeasurementText,
  type MeasurementValues,
} from '@/shared/contract';

const TODAY = '2025-06-15';

const GOOD: MeasurementText = {
  measuredAt: '2025-06-01',
  method: 'optical',
  device: 'Biometer 1',
  axialLengthMm: '23.50',
  axialLengthSdMm: '0.02',
  flatKD: '43.25',
  flatAxisDeg: '0',
  steepKD: '44.00',
  steepAxisDeg: '92',
  keratometricIndex: '1.3375',
  acdMm: '3.10',
  acdFrom: 'epithelium',
  lensThicknessMm: '4.50',
  cornealThicknessUm: '545',
  whiteToWhiteMm: '11.8',
  pupilMm: '3.2',
  operator: 'Invented Operator',
  remarks: 'first line\nsecond line',
};

const RADII: MeasurementText = {
  ...GOOD,
  flatKD: '',
  steepKD: '',
  keratometricIndex: '',
  flatRadiusMm: '7.80',
  steepRadiusMm: '7.67',
};

const read = (text: MeasurementText) => readMeasurement(text, { today: TODAY, birthDate: '1950-01-01' });
const valuesOf = (text: MeasurementText): MeasurementValues => {
  const reading = read(text);
  if ('problems' in reading) throw new Error(JSON.stringify(reading.problems));
  return reading.values;
};
const problemsOf = (change: MeasurementText, base = GOOD): MeasurementProblem[] => {
  const reading = read({ ...base, ...change });
  return 'problems' in reading ? reading.problems : [];
};
const only = (change: MeasurementText, base = GOOD): MeasurementProblem => {
  const problems = problemsOf(change, base);
  expect(problems).toHaveLength(1);
  return problems[0] as MeasurementProblem;
};

describe('a good measurement', () => {
  it('is read with radii from power and index, and axis 0 as 180', () => {
    expect(valuesOf(GOOD)).toEqual({
      measuredAt: '2025-06-01',
      method: 'optical',
      device: 'Biometer 1',
      axialLengthMm: 23.5,
      axialLengthSdMm: 0.02,
      flatRadiusMm: 7.803468208, // 337.5 / 43.25
      steepRadiusMm: 7.670454545, // 337.5 / 44
      flatKD: 43.25,
      steepKD: 44,
      keratometricIndex: 1.3375,
      flatAxisDeg: 180,
      steepAxisDeg: 92,
      acdMm: 3.1,
      acdFrom: 'epithelium',
      lensThicknessMm: 4.5,
      cornealThicknessUm: 545,
      whiteToWhiteMm: 11.8,
      pupilMm: 3.2,
      operator: 'Invented Operator',
      remarks: 'first line\nsecond line',
    });
  });

  it('uses the declared index and no other', () => {
    expect(valuesOf({ ...GOOD, keratometricIndex: '1.332' }).flatRadiusMm).toBe(7.676300578);
  });

  it('takes a decimal comma', () => {
    expect(valuesOf({ ...GOOD, axialLengthMm: '23,51' }).axialLengthMm).toBe(23.51);
  });

  it('is complete with radii alone, and everything optional left out', () => {
    const values = valuesOf({
      measuredAt: '2025-06-15',
      method: 'Immersion',
      axialLengthMm: '23.5',
      flatRadiusMm: '7.8',
      steepRadiusMm: '7.8',
    });

    expect(values).toMatchObject({
      method: 'immersion',
      flatRadiusMm: 7.8,
      flatKD: null,
      acdMm: null,
      device: '',
    });
    expect(values.keratometricIndex).toBeNull();
  });

  it('keeps radii as the truth when powers agree within 0.25 D', () => {
    const values = valuesOf({ ...GOOD, flatRadiusMm: '7.80', steepRadiusMm: '7.67' });

    expect(values).toMatchObject({ flatRadiusMm: 7.8, steepRadiusMm: 7.67, flatKD: 43.25, steepKD: 44 });
  });

  it('keeps powers without an index when some index explains both meridians', () => {
    const values = valuesOf({ ...RADII, flatKD: '42.56', steepKD: '43.29' });

    expect(values).toMatchObject({ flatKD: 42.56, keratometricIndex: null, flatRadiusMm: 7.8 });
  });

  it('keeps text that looks like a formula of a spreadsheet as it is', () => {
    expect(valuesOf({ ...GOOD, remarks: '=1+1', operator: '@me', device: '+x' })).toMatchObject({
      remarks: '=1+1',
      operator: '@me',
      device: '+x',
    });
  });

  it('drops the reference of a depth that is not given', () => {
    expect(valuesOf({ ...GOOD, acdMm: '' }).acdFrom).toBeNull();
  });
});

describe('what is missing', () => {
  it.each<[keyof MeasurementText, string]>([
    ['measuredAt', 'Date of the measurement is missing'],
    ['method', 'Method is missing: write optical, immersion or contact'],
    ['axialLengthMm', 'Axial length is missing'],
    ['flatKD', 'Flat keratometry is missing: give both meridians'],
    ['steepKD', 'Steep keratometry is missing: give both meridians'],
    ['acdFrom', 'Say where the anterior chamber depth was measured from: epithelium or endothelium'],
  ])('%s is named', (field, message) => {
    expect(only({ [field]: ' ' })).toEqual({ field, message });
  });

  it('refuses powers without index and without radii', () => {
    const problem = only({ keratometricIndex: '' });

    expect(problem.field).toBe('keratometricIndex');
    expect(problem.message).toContain('1.3375 is usual');
  });

  it('asks for keratometry when there is none', () => {
    expect(only({ flatKD: '', steepKD: '' })).toEqual({
      field: 'flatKD',
      message: 'Keratometry is missing: give powers with their index, or radii',
    });
  });

  it('refuses one radius without the other', () => {
    expect(only({ steepRadiusMm: '' }, RADII).message).toBe('Steep radius is missing: give both meridians');
  });

  it('says every problem at once', () => {
    const fields = problemsOf({ method: 'guess', axialLengthMm: 'x', acdFrom: '', pupilMm: '99' }).map(
      ({ field }) => field,
    );

    expect(fields).toEqual(['method', 'axialLengthMm', 'pupilMm', 'acdFrom']);
  });
});

describe('units and typing errors', () => {
  it.each<[keyof MeasurementText, string, string]>([
    [
      'axialLengthMm',
      '2350',
      'Axial length must lie between 14 and 40 mm; 2350 looks like 23.50 mm without its decimal mark',
    ],
    ['axialLengthMm', '235', '235 looks like 23.50 mm without its decimal mark'],
    ['axialLengthMm', '23500', '23500 looks like µm'],
    ['axialLengthMm', '2.35', '2.35 looks like cm'],
    ['axialLengthMm', '13.99', 'Axial length must lie between 14 and 40 mm'],
    ['flatKD', '7.8', '7.8 looks like a radius in mm, this field takes a power in dioptres'],
    ['steepKD', '4400', '4400 looks like 44.00 D without its decimal mark'],
    ['acdMm', '3100', '3100 looks like µm'],
    ['acdMm', '310', '310 looks like 3.10 mm without its decimal mark'],
    ['cornealThicknessUm', '0.54', '0.54 looks like mm'],
    ['lensThicknessMm', '4500', '4500 looks like µm'],
    ['whiteToWhiteMm', '118', '118 looks like 11.80 mm without its decimal mark'],
    ['keratometricIndex', '13375', '13375 looks like 1.3375 without its decimal mark'],
    ['flatAxisDeg', '181', 'Flat axis must lie between 0 and 180 °'],
    ['axialLengthMm', '23.5.1', 'Axial length "23.5.1" is not a number'],
    ['axialLengthMm', '1,234.5', 'Axial length "1,234.5" is not a number'],
    ['axialLengthMm', '23.5 mm', 'Axial length "23.5 mm" is not a number'],
    ['axialLengthMm', 'NaN', 'is not a number'],
    ['axialLengthMm', '1e1', 'is not a number'],
    ['axialLengthMm', '23\u00005', 'Axial length "23□5" is not a number'],
  ])('%s %j', (field, text, message) => {
    const problem = only({ [field]: text });

    expect(problem.field).toBe(field);
    expect(problem.message).toContain(message);
  });

  it('hints at dioptres in a radius column', () => {
    const [flat, steep] = problemsOf({ flatRadiusMm: '43', steepRadiusMm: '44.5' }, RADII);

    expect(flat).toEqual({
      field: 'flatRadiusMm',
      message:
        'Flat radius must lie between 4.5 and 13.5 mm; 43 looks like a power in dioptres, this field takes a radius in mm',
    });
    expect(steep?.field).toBe('steepRadiusMm');
  });

  it('refuses depth and lens that do not fit into one eye', () => {
    expect(only({ acdMm: '5.5', lensThicknessMm: '6' }).message).toContain('together exceed 11 mm');
  });

  it('accepts the limits themselves and nothing beyond', () => {
    for (const { field, min, max } of MEASUREMENT_FIELDS) {
      for (const value of [min - 0.001, max + 0.001]) {
        const fields = problemsOf({ [field]: String(value) }).map((problem) => problem.field);
        expect(fields).toContain(field);
      }
    }
    expect(
      valuesOf({ ...RADII, axialLengthMm: '14', pupilMm: '10', cornealThicknessUm: '900' }),
    ).toMatchObject({
      axialLengthMm: 14,
      pupilMm: 10,
    });
    expect(valuesOf({ ...GOOD, flatKD: '75', steepKD: '75' }).flatRadiusMm).toBe(4.5);
  });
});

describe('the cornea', () => {
  it('refuses swapped powers and swapped radii with the hint', () => {
    expect(only({ flatKD: '45', steepKD: '43' })).toEqual({
      field: 'flatKD',
      message: 'Flat keratometry 45 D is steeper than steep 43 D: are the two swapped?',
    });
    expect(only({ flatRadiusMm: '7.5', steepRadiusMm: '7.8' }, RADII)).toEqual({
      field: 'flatRadiusMm',
      message: 'Flat radius 7.5 mm is smaller than steep 7.8 mm: are the two swapped?',
    });
  });

  it('refuses power and radius that disagree by more than 0.25 D at the declared index', () => {
    // 337.5 / 7.80 = 43.269 D
    const within = { flatRadiusMm: '7.80', steepRadiusMm: '7.67', flatKD: '43.51' };

    expect(problemsOf(within)).toEqual([]);
    expect(only({ ...within, flatKD: '43.53' })).toEqual({
      field: 'flatKD',
      message: 'Flat keratometry 43.53 D and flat radius 7.8 mm disagree by 0.26 D at index 1.3375',
    });
  });

  it('refuses powers and radii that no index joins', () => {
    expect(only({ flatKD: '50', steepKD: '52' }, RADII).field).toBe('keratometricIndex');
    expect(only({ flatKD: '41', steepKD: '45' }, RADII).field).toBe('keratometricIndex');
  });

  it('refuses axes that do not stand 90° apart within 5°', () => {
    expect(problemsOf({ flatAxisDeg: '5', steepAxisDeg: '90' })).toEqual([]);
    expect(problemsOf({ flatAxisDeg: '178', steepAxisDeg: '83' })).toEqual([]);
    expect(only({ flatAxisDeg: '5', steepAxisDeg: '89' })).toEqual({
      field: 'steepAxisDeg',
      message:
        'Flat axis 5° and steep axis 89° are 84° apart and should be 90°: is one of them mistyped, or from another measurement?',
    });
    expect(only({ flatAxisDeg: '179', steepAxisDeg: '2' }).message).toContain(
      'is one axis written in both places?',
    );
  });

  it('accepts one axis alone', () => {
    expect(valuesOf({ ...GOOD, flatAxisDeg: '' })).toMatchObject({ flatAxisDeg: null, steepAxisDeg: 92 });
  });

  it('refuses more than 15 D between flat and steep, and a radius beyond its limits', () => {
    expect(only({ flatKD: '40', steepKD: '56' }).message).toContain('differ by 16.00 D');
    expect(only({ flatKD: '72', steepKD: '75', keratometricIndex: '1.332' }).message).toContain(
      'is a radius of',
    );
  });
});

describe('dates and text', () => {
  it.each([
    ['2026-02-30', '"2026-02-30" is not a date of the calendar: write it as YYYY-MM-DD'],
    ['2025-13-01', 'is not a date of the calendar'],
    ['01.06.2025', 'is not a date of the calendar'],
    ['2025-6-1', 'is not a date of the calendar'],
    ['2025-06-16', '2025-06-16 lies in the future'],
    ['1949-12-31', '1949-12-31 lies before the birth on 1950-01-01'],
  ])('refuses the date %s', (measuredAt, message) => {
    expect(only({ measuredAt }).message).toContain(message);
  });

  it('knows leap years', () => {
    expect(problemsOf({ measuredAt: '2024-02-29' })).toEqual([]);
    expect(problemsOf({ measuredAt: '2023-02-29' })).toHaveLength(1);
  });

  it.each<[keyof MeasurementText, string, string]>([
    ['remarks', 'a\u0000b', 'Remarks contains control characters'],
    ['operator', 'a\nb', 'Operator contains control characters'],
    ['device', 'a\u0085b', 'Device contains control characters'],
    ['device', 'd'.repeat(101), 'Device is longer than 100 characters'],
    ['operator', 'd'.repeat(101), 'Operator is longer than 100 characters'],
    ['remarks', 'd'.repeat(501), 'Remarks is longer than 500 characters'],
  ])('refuses %s', (field, text, message) => {
    expect(only({ [field]: text })).toEqual({ field, message });
  });

  it('reads line breaks of any system as one', () => {
    expect(valuesOf({ ...GOOD, remarks: 'a\r\nb\rc' }).remarks).toBe('a\nb\nc');
  });
});

describe('as a schema', () => {
  it('gives the values, or an issue at the field', () => {
    const bad = measurementEntrySchema.safeParse({
      text: { ...GOOD, axialLengthMm: '2350' },
      supersedesId: null,
      reason: '',
    });

    expect(measurementTextSchema.parse(GOOD).axialLengthMm).toBe(23.5);
    expect(bad.error?.issues).toEqual([
      expect.objectContaining({
        path: ['text', 'axialLengthMm'],
        message: expect.stringContaining('23.50 mm'),
      }),
    ]);
  });

  it('asks for a reason when another measurement is superseded', () => {
    const supersedesId = '0b8f3d6e-6a0a-4c6e-9a53-0d6c2b7a1f10';
    const entry = { text: GOOD, supersedesId, reason: 'no' };

    expect(measurementEntryRequestSchema.safeParse(entry).error?.issues[0]?.path).toEqual(['reason']);
    expect(measurementEntryRequestSchema.safeParse({ ...entry, reason: 'wrong side' }).success).toBe(true);
    expect(
      measurementEntryRequestSchema.safeParse({ ...entry, supersedesId: null, reason: '' }).success,
    ).toBe(true);
  });
});

describe('any text', () => {
  it('is read or refused with a field and a message, never thrown at', () => {
    const anyText = fc.record(
      Object.fromEntries(
        Object.keys(GOOD).map((field) => [field, fc.oneof(fc.string(), fc.double().map(String))]),
      ),
      { requiredKeys: [] },
    );

    fc.assert(
      fc.property(anyText, (text) => {
        const reading = read(text);
        if ('problems' in reading) return reading.problems.every(({ field, message }) => field && message);
        return Number.isFinite(reading.values.flatRadiusMm);
      }),
    );
  });
});
