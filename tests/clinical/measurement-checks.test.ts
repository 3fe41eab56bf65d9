/** Every rule below, at and above its threshold, and with its value missing. */
import { CHECK_LIMITS } from '@/shared/clinical/check-thresholds';
import { CHECK_RULES, checkMeasurements } from '@/shared/clinical/measurement-checks';
import { aQuestion, radiusOf, type CheckCase } from './support/eyes';

const flagOf = (ruleId: string, given: CheckCase) =>
  checkMeasurements(aQuestion(given)).find((flag) => flag.ruleId === ruleId);
const severityOf = (ruleId: string, given: CheckCase) => flagOf(ruleId, given)?.severity ?? null;

/** Both meridians at one power, so that the mean is exactly that power. */
const round = (meanD: number) => ({ flatRadiusMm: radiusOf(meanD), steepRadiusMm: radiusOf(meanD) });
const cylinder = (cylinderD: number) => ({
  flatRadiusMm: radiusOf(43),
  steepRadiusMm: radiusOf(43 + cylinderD),
});

type Row = [ruleId: string, when: string, given: CheckCase, severity: 'stop' | 'weigh' | 'note' | null];

const LENGTH_AND_CORNEA: Row[] = [
  ['axial-length-outlier', '21.29 mm', { values: { axialLengthMm: 21.29 } }, 'weigh'],
  ['axial-length-outlier', '21.30 mm', { values: { axialLengthMm: 21.3 } }, null],
  ['axial-length-outlier', '26.60 mm', { values: { axialLengthMm: 26.6 } }, null],
  ['axial-length-outlier', '26.61 mm', { values: { axialLengthMm: 26.61 } }, 'weigh'],
  ['keratometry-outlier', '40.99 D', { values: round(40.99) }, 'weigh'],
  ['keratometry-outlier', '41.00 D', { values: round(41) }, null],
  ['keratometry-outlier', '47.00 D', { values: round(47) }, null],
  ['keratometry-outlier', '47.01 D', { values: round(47.01) }, 'weigh'],
  [
    'meridian-outlier',
    'flat 37.9 D',
    { values: { flatRadiusMm: radiusOf(37.9), steepRadiusMm: radiusOf(44.5) } },
    'note',
  ],
  [
    'meridian-outlier',
    'flat 38.0 D, steep 50.0 D',
    { values: { flatRadiusMm: radiusOf(38), steepRadiusMm: radiusOf(50) } },
    null,
  ],
  [
    'meridian-outlier',
    'steep 50.1 D',
    { values: { flatRadiusMm: radiusOf(43), steepRadiusMm: radiusOf(50.1) } },
    'note',
  ],
  ['corneal-astigmatism', '2.49 D', { values: cylinder(2.49) }, null],
  ['corneal-astigmatism', '2.50 D', { values: cylinder(2.5) }, null],
  ['corneal-astigmatism', '2.51 D', { values: cylinder(2.51) }, 'weigh'],
  [
    'length-to-radius',
    '2.69',
    { values: { axialLengthMm: 21.52, flatRadiusMm: 8, steepRadiusMm: 8 } },
    'weigh',
  ],
  ['length-to-radius', '2.70', { values: { axialLengthMm: 21.6, flatRadiusMm: 8, steepRadiusMm: 8 } }, null],
  [
    'length-to-radius',
    '3.50',
    { values: { axialLengthMm: 26.25, flatRadiusMm: 7.5, steepRadiusMm: 7.5 } },
    null,
  ],
  [
    'length-to-radius',
    '3.51',
    { values: { axialLengthMm: 26.325, flatRadiusMm: 7.5, steepRadiusMm: 7.5 } },
    'weigh',
  ],
  ['axial-length-repeatability', 'optical 0.03 mm', { values: { axialLengthSdMm: 0.03 } }, null],
  ['axial-length-repeatability', 'optical 0.031 mm', { values: { axialLengthSdMm: 0.031 } }, 'note'],
  ['axial-length-repeatability', 'optical 0.05 mm', { values: { axialLengthSdMm: 0.05 } }, 'note'],
  ['axial-length-repeatability', 'optical 0.051 mm', { values: { axialLengthSdMm: 0.051 } }, 'weigh'],
  [
    'axial-length-repeatability',
    'immersion 0.10 mm',
    { values: { method: 'immersion', axialLengthSdMm: 0.1 } },
    null,
  ],
  [
    'axial-length-repeatability',
    'immersion 0.11 mm',
    { values: { method: 'immersion', axialLengthSdMm: 0.11 } },
    'note',
  ],
  [
    'axial-length-repeatability',
    'contact 0.12 mm',
    { values: { method: 'contact', axialLengthSdMm: 0.12 } },
    'note',
  ],
  [
    'axial-length-repeatability',
    'contact 0.13 mm',
    { values: { method: 'contact', axialLengthSdMm: 0.13 } },
    'weigh',
  ],
  ['axial-length-repeatability', 'not given', { values: { axialLengthSdMm: null } }, null],
  ['contact-ultrasound', 'contact', { values: { method: 'contact' } }, 'weigh'],
  ['contact-ultrasound', 'immersion', { values: { method: 'immersion' } }, null],
  ['contact-ultrasound', 'optical', {}, null],
];

const BETWEEN_EYES: Row[] = [
  [
    'between-eyes-axial-length',
    '0.29 mm',
    { values: { axialLengthMm: 23.5 }, fellow: { axialLengthMm: 23.79 } },
    null,
  ],
  [
    'between-eyes-axial-length',
    '0.30 mm',
    { values: { axialLengthMm: 23.5 }, fellow: { axialLengthMm: 23.8 } },
    'note',
  ],
  [
    'between-eyes-axial-length',
    '0.70 mm',
    { values: { axialLengthMm: 24.2 }, fellow: { axialLengthMm: 23.5 } },
    'note',
  ],
  [
    'between-eyes-axial-length',
    '0.71 mm',
    { values: { axialLengthMm: 24.21 }, fellow: { axialLengthMm: 23.5 } },
    'weigh',
  ],
  [
    'between-eyes-axial-length',
    '0.704 mm',
    { values: { axialLengthMm: 24.204 }, fellow: { axialLengthMm: 23.5 } },
    'weigh',
  ],
  [
    'between-eyes-axial-length',
    'fellow not measured',
    { values: { axialLengthMm: 24.21 }, fellow: null },
    null,
  ],
  ['between-eyes-keratometry', '0.90 D', { values: round(43), fellow: round(43.9) }, null],
  ['between-eyes-keratometry', '0.91 D', { values: round(43), fellow: round(43.91) }, 'weigh'],
  ['between-eyes-keratometry', 'fellow not measured', { values: round(43), fellow: null }, null],
  [
    'between-eyes-identical',
    'length and cornea alike',
    { values: { axialLengthMm: 23.5, ...round(43) }, fellow: { axialLengthMm: 23.5, ...round(43) } },
    'weigh',
  ],
  [
    'between-eyes-identical',
    'length alike only',
    { values: { axialLengthMm: 23.5, ...round(43) }, fellow: { axialLengthMm: 23.5, ...round(43.1) } },
    null,
  ],
  ['between-eyes-identical', 'fellow not measured', { fellow: null }, null],
  ['between-eyes-method', 'ultrasound beside optical', { values: { method: 'immersion' } }, 'note'],
  [
    'between-eyes-method',
    'immersion beside contact',
    { values: { method: 'immersion' }, fellow: { method: 'contact' } },
    null,
  ],
  ['between-eyes-method', 'fellow not measured', { values: { method: 'immersion' }, fellow: null }, null],
];

const CHAMBER_AND_LENS: Row[] = [
  [
    'chamber-depth-reference',
    'from the endothelium, cornea known',
    { values: { acdFrom: 'endothelium' } },
    null,
  ],
  [
    'chamber-depth-reference',
    'from the endothelium, cornea not known',
    { values: { acdFrom: 'endothelium', cornealThicknessUm: null } },
    'weigh',
  ],
  [
    'chamber-depth-reference',
    'no depth',
    { values: { acdMm: null, acdFrom: null, cornealThicknessUm: null } },
    null,
  ],
  ['shallow-chamber', '2.49 mm', { values: { acdMm: 2.49 } }, 'weigh'],
  ['shallow-chamber', '2.50 mm', { values: { acdMm: 2.5 } }, null],
  [
    'shallow-chamber',
    '1.95 mm behind 550 µm: exactly 2.50',
    { values: { acdMm: 1.95, acdFrom: 'endothelium', cornealThicknessUm: 550 } },
    null,
  ],
  ['shallow-chamber', 'not measured', { values: { acdMm: null, acdFrom: null } }, null],
  [
    'shallow-chamber',
    'pseudophakic',
    { values: { acdMm: 2.2 }, history: { lensStatus: 'pseudophakic' } },
    null,
  ],
  [
    'shallow-chamber',
    'lens status not answered',
    { values: { acdMm: 2.2 }, history: { lensStatus: null } },
    'weigh',
  ],
  ['deep-chamber', '4.20 mm', { values: { acdMm: 4.2 } }, null],
  ['deep-chamber', '4.21 mm', { values: { acdMm: 4.21 } }, 'note'],
  ['deep-chamber', 'pseudophakic', { values: { acdMm: 4.8 }, history: { lensStatus: 'pseudophakic' } }, null],
  ['thick-lens', '5.00 mm', { values: { lensThicknessMm: 5 } }, null],
  ['thick-lens', '5.01 mm', { values: { lensThicknessMm: 5.01 } }, 'note'],
  ['thick-lens', '5.40 mm', { values: { lensThicknessMm: 5.4 } }, 'note'],
  ['thick-lens', '5.41 mm', { values: { lensThicknessMm: 5.41 } }, 'weigh'],
  ['thick-lens', 'not measured', { values: { lensThicknessMm: null } }, null],
  ['thin-lens', '3.50 mm', { values: { lensThicknessMm: 3.5 } }, null],
  ['thin-lens', '3.49 mm', { values: { lensThicknessMm: 3.49 } }, 'note'],
  [
    'thin-lens',
    'pseudophakic',
    { values: { lensThicknessMm: 2.4 }, history: { lensStatus: 'pseudophakic' } },
    null,
  ],
  ['swollen-lens', 'thick and shallow', { values: { lensThicknessMm: 5.01, acdMm: 2.49 } }, 'weigh'],
  [
    'swollen-lens',
    'thick, chamber 2.50 mm',
    { values: { lensThicknessMm: 5.01, acdMm: 2.5 }, fellow: { lensThicknessMm: 4.9 } },
    null,
  ],
  [
    'swollen-lens',
    '5.00 mm and shallow',
    { values: { lensThicknessMm: 5, acdMm: 2.4 }, fellow: { lensThicknessMm: 4.9 } },
    null,
  ],
  [
    'swollen-lens',
    'thick, chamber not measured',
    { values: { lensThicknessMm: 5.01, acdMm: null }, fellow: { lensThicknessMm: 4.9 } },
    null,
  ],
  [
    'swollen-lens',
    '0.50 mm over the fellow',
    { values: { lensThicknessMm: 4.9 }, fellow: { lensThicknessMm: 4.4 } },
    null,
  ],
  [
    'swollen-lens',
    '0.51 mm over the fellow',
    { values: { lensThicknessMm: 4.91 }, fellow: { lensThicknessMm: 4.4 } },
    'weigh',
  ],
  [
    'swollen-lens',
    'fellow pseudophakic',
    {
      values: { lensThicknessMm: 4.9 },
      fellow: { lensThicknessMm: 2.1 },
      fellowHistory: { lensStatus: 'pseudophakic' },
    },
    null,
  ],
  [
    'swollen-lens',
    'fellow thickness missing',
    { values: { lensThicknessMm: 4.9 }, fellow: { lensThicknessMm: null } },
    null,
  ],
  ['chamber-and-lens', '6.49 mm', { values: { acdMm: 2.69, lensThicknessMm: 3.8 } }, 'note'],
  ['chamber-and-lens', '6.50 mm', { values: { acdMm: 2.7, lensThicknessMm: 3.8 } }, null],
  ['chamber-and-lens', '8.50 mm', { values: { acdMm: 3.6, lensThicknessMm: 4.9 } }, null],
  ['chamber-and-lens', '8.51 mm', { values: { acdMm: 3.61, lensThicknessMm: 4.9 } }, 'note'],
  ['chamber-and-lens', '11.01 mm', { values: { acdMm: 5.01, lensThicknessMm: 6 } }, 'weigh'],
  ['chamber-and-lens', 'one missing', { values: { acdMm: 3.6, lensThicknessMm: null } }, null],
  ['white-to-white', '10.74 mm', { values: { whiteToWhiteMm: 10.74 } }, 'note'],
  ['white-to-white', '10.75 mm', { values: { whiteToWhiteMm: 10.75 } }, null],
  ['white-to-white', '13.00 mm', { values: { whiteToWhiteMm: 13 } }, null],
  ['white-to-white', '13.01 mm', { values: { whiteToWhiteMm: 13.01 } }, 'note'],
  ['white-to-white', 'not measured', { values: { whiteToWhiteMm: null } }, null],
  ['corneal-thickness', '449 µm', { values: { cornealThicknessUm: 449 } }, 'note'],
  ['corneal-thickness', '450 µm', { values: { cornealThicknessUm: 450 } }, null],
  ['corneal-thickness', '620 µm', { values: { cornealThicknessUm: 620 } }, null],
  ['corneal-thickness', '621 µm', { values: { cornealThicknessUm: 621 } }, 'note'],
  ['corneal-thickness', 'not measured', { values: { cornealThicknessUm: null } }, null],
];

const RECORD: Row[] = [
  ['measured-long-ago', 'exactly 12 months', { values: { measuredAt: '2025-03-02' } }, null],
  ['measured-long-ago', '12 months and a day', { values: { measuredAt: '2025-03-01' } }, 'note'],
  [
    'measured-long-ago',
    'exactly 24 months, a leap day between',
    { values: { measuredAt: '2024-03-02' }, today: '2026-03-02' },
    'note',
  ],
  ['measured-long-ago', '24 months and a day', { values: { measuredAt: '2024-03-01' } }, 'weigh'],
  ['measured-long-ago', 'today', { values: { measuredAt: '2026-03-02' } }, null],
  ['values-missing', 'none', {}, null],
  ['values-missing', 'lens thickness', { values: { lensThicknessMm: null } }, 'note'],
  ['axes-missing', '0.74 D', { values: { ...cylinder(0.74), flatAxisDeg: null, steepAxisDeg: null } }, null],
  [
    'axes-missing',
    '0.75 D',
    { values: { ...cylinder(0.75), flatAxisDeg: null, steepAxisDeg: null } },
    'note',
  ],
  ['axes-missing', '0.75 D, flat axis given', { values: { ...cylinder(0.75), steepAxisDeg: null } }, null],
];

const HISTORY: Row[] = [
  ['corneal-surgery-unanswered', 'not answered', { history: { cornealSurgery: null } }, 'stop'],
  ['corneal-surgery-unanswered', 'unknown', { history: { cornealSurgery: 'unknown' } }, 'stop'],
  ['corneal-surgery-unanswered', 'no', {}, null],
  ['corneal-surgery', 'yes', { history: { cornealSurgery: 'yes' } }, 'stop'],
  ['corneal-surgery', 'unknown', { history: { cornealSurgery: 'unknown' } }, null],
  ['lens-status-missing', 'not answered', { history: { lensStatus: null } }, 'stop'],
  ['lens-status-missing', 'pseudophakic', { history: { lensStatus: 'pseudophakic' } }, null],
  ['lens-status-not-phakic', 'pseudophakic', { history: { lensStatus: 'pseudophakic' } }, 'note'],
  ['lens-status-not-phakic', 'phakic', {}, null],
  ['lens-status-not-phakic', 'not answered', { history: { lensStatus: null } }, null],
  [
    'vitreous-status-missing',
    'not answered, ultrasound',
    { values: { method: 'immersion' }, history: { vitreousStatus: null } },
    'stop',
  ],
  [
    'vitreous-status-missing',
    'unknown, ultrasound',
    { values: { method: 'contact' }, history: { vitreousStatus: 'unknown' } },
    'stop',
  ],
  ['vitreous-status-missing', 'not answered, optical', { history: { vitreousStatus: null } }, null],
  ['vitreous-status-missing', 'vitreous, ultrasound', { values: { method: 'immersion' } }, null],
  [
    'silicone-oil',
    'ultrasound',
    { values: { method: 'immersion' }, history: { vitreousStatus: 'silicone-oil' } },
    'stop',
  ],
  ['silicone-oil', 'optical', { history: { vitreousStatus: 'silicone-oil' } }, null],
  ['vitreous-replaced', 'oil, optical', { history: { vitreousStatus: 'silicone-oil' } }, 'weigh'],
  [
    'vitreous-replaced',
    'oil, ultrasound',
    { values: { method: 'immersion' }, history: { vitreousStatus: 'silicone-oil' } },
    null,
  ],
  ['vitreous-replaced', 'gas', { history: { vitreousStatus: 'gas' } }, 'weigh'],
  ['vitreous-replaced', 'vitreous', {}, null],
];

const ROWS = [...HISTORY, ...BETWEEN_EYES, ...LENGTH_AND_CORNEA, ...CHAMBER_AND_LENS, ...RECORD];

describe('the checks of a measurement', () => {
  it('find nothing in an eye without anything to find', () => {
    expect(checkMeasurements(aQuestion())).toEqual([]);
  });

  it.each(ROWS)('%s, %s', (ruleId, _when, given, severity) => {
    expect(severityOf(ruleId, given)).toBe(severity);
  });

  it('have a case that raises each rule and one that does not', () => {
    for (const { id } of CHECK_RULES) {
      const severities = ROWS.filter(([ruleId]) => ruleId === id).map(([, , , severity]) => severity);
      expect([id, severities.includes(null), severities.some((one) => one !== null)]).toEqual([
        id,
        true,
        true,
      ]);
    }
  });

  it('carry source, mark and advice, unsettled, each rule once', () => {
    const flags = ROWS.flatMap(([, , given]) => checkMeasurements(aQuestion(given)));
    for (const flag of flags) {
      expect(flag.source.length).toBeGreaterThan(5);
      expect(flag.advice).toMatch(/\.$/);
      expect(flag.message).not.toMatch(/\.$|NaN|undefined|null/);
      expect(flag.settlement).toBeNull();
    }
    const ids = CHECK_RULES.map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('never make a rule from memory or opinion stricter than weigh, except where it guards against a data error', () => {
    const stops = ROWS.filter(([, , , severity]) => severity === 'stop').map(([ruleId]) => ruleId);
    expect([...new Set(stops)]).toEqual([
      'corneal-surgery-unanswered',
      'corneal-surgery',
      'lens-status-missing',
      'vitreous-status-missing',
      'silicone-oil',
    ]);
  });

  it('let nobody settle surgery of the cornea or oil under ultrasound away', () => {
    const settleable = HISTORY.filter(([, , , severity]) => severity === 'stop').map(
      ([ruleId, , given]) => [ruleId, flagOf(ruleId, given)?.canBeSettled] as const,
    );
    expect(Object.fromEntries(settleable)).toEqual({
      'corneal-surgery-unanswered': true,
      'corneal-surgery': false,
      'lens-status-missing': true,
      'vitreous-status-missing': true,
      'silicone-oil': false,
    });
  });
});

describe('what a flag says', () => {
  it('never reads like the limit that was passed', () => {
    expect(flagOf('axial-length-outlier', { values: { axialLengthMm: 26.604 } })?.message).toBe(
      'Axial length 26.604 mm lies outside 21.30 to 26.60 mm',
    );
    expect(
      flagOf('between-eyes-axial-length', {
        values: { axialLengthMm: 24.204 },
        fellow: { axialLengthMm: 23.5 },
      })?.message,
    ).toBe('The axial lengths of the two eyes differ by 0.704 mm');
  });

  it('says of a difference between the eyes how usual it is at this length', () => {
    const adviceFor = (longerMm: number) =>
      flagOf('between-eyes-axial-length', {
        values: { axialLengthMm: longerMm },
        fellow: { axialLengthMm: longerMm - 0.5 },
      })?.advice;

    expect(adviceFor(22)).toMatch(/22 mm or shorter differ by less than 0\.5 mm\.$/);
    expect(adviceFor(28)).toMatch(
      /^Look whether.*Usual in long eyes: those of 28 mm or longer by less than 4\.0 mm/,
    );
    expect(adviceFor(24)).toMatch(/0\.5 mm, 28 mm or longer by less than 4\.0 mm\.$/);
  });

  it('names the signs of a swollen lens, and those still to look at', () => {
    expect(
      flagOf('swollen-lens', {
        values: { lensThicknessMm: 5.62, acdMm: 2.21 },
        fellow: { lensThicknessMm: 4.6 },
      })?.message,
    ).toBe(
      'Pattern of a swollen lens: lens 5.62 mm, chamber 2.21 mm, 1.02 mm thicker than the fellow lens. Still to look at: white reflex at the slit lamp',
    );
    expect(
      flagOf('swollen-lens', { values: { lensThicknessMm: 5.62, acdMm: 2.21 }, fellow: null })?.message,
    ).toMatch(/Still to look at: thickness of the fellow lens, white reflex at the slit lamp$/);
  });

  it('asks a young patient with a swollen lens for its cause, up to the 45th birthday', () => {
    const adviceOf = (birthDate: string) =>
      flagOf('swollen-lens', { values: { lensThicknessMm: 5.62, acdMm: 2.21 }, birthDate })?.advice;

    expect(adviceOf('1981-03-03')).toMatch(/ask for trauma, steroids, atopy, uveitis and diabetes\.$/);
    expect(adviceOf('1981-03-02')).not.toMatch(/trauma/);
  });

  it('calls a chamber below 2.2 mm a high risk', () => {
    expect(flagOf('shallow-chamber', { values: { acdMm: 2.19 } })?.message).toBe(
      'Anterior chamber 2.19 mm is shallow, high risk',
    );
    expect(flagOf('shallow-chamber', { values: { acdMm: 2.2 } })?.message).toBe(
      'Anterior chamber 2.20 mm is shallow',
    );
  });

  it('lists what was not measured', () => {
    expect(
      flagOf('values-missing', {
        values: { acdMm: null, acdFrom: null, lensThicknessMm: null, cornealThicknessUm: null },
      })?.message,
    ).toBe('Not measured: anterior chamber depth, lens thickness, corneal thickness');
  });

  it('counts the months since the measurement', () => {
    expect(flagOf('measured-long-ago', { values: { measuredAt: '2024-01-15' } })?.message).toBe(
      'Measured more than 25 months ago',
    );
  });

  it('tells surgery that is not known from surgery that nobody asked for', () => {
    expect(flagOf('corneal-surgery-unanswered', { history: { cornealSurgery: null } })?.message).toBe(
      'Nobody has answered whether this cornea had surgery',
    );
    expect(flagOf('corneal-surgery-unanswered', { history: { cornealSurgery: 'unknown' } })?.message).toBe(
      'It is not known whether this cornea had surgery',
    );
  });
});

describe('the thresholds', () => {
  it('can be others of the same shape', () => {
    const question = {
      ...aQuestion({ values: { axialLengthMm: 22 } }),
      limits: { ...CHECK_LIMITS, axialLengthMm: { low: 22.5, high: 25 } },
    };

    const found = checkMeasurements(question).find(({ ruleId }) => ruleId === 'axial-length-outlier');
    expect(found?.message).toBe('Axial length 22.00 mm lies outside 22.50 to 25.00 mm');
  });

  it('are the published ones, copied by hand', () => {
    expect(CHECK_LIMITS).toMatchObject({
      axialLengthMm: { low: 21.3, high: 26.6 },
      meanKeratometryD: { low: 41, high: 47 },
      cornealCylinderD: 2.5,
      betweenEyesAxialLengthMm: { note: 0.3, weigh: 0.7 },
      betweenEyesKeratometryD: 0.9,
      lensThicknessMm: { note: 5, weigh: 5.4 },
      shallowChamberMm: 2.5,
      axialLengthToRadius: { low: 2.7, high: 3.5 },
      ageMonths: { note: 12, weigh: 24 },
    });
  });
});
