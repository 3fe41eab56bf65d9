/**
 * eyes.json: results of an independent implementation of the same published formulas in another language, 6
 * decimals. It is not a published standard: it proves the optics and the code, not recalled coefficients.
 */
import { planToric, prepareFormula } from '@/formulas';
import { correctedAxialLengthMm } from '@/formulas/third-generation/srkt';
import { wangKochLines } from '@/formulas/axial-length/wang-koch';
import reference from './eyes.json';
import type { EyeGeometry, FormulaId, FormulaOptions, LensConstants } from '@/formulas';

const TOLERANCE = 1e-6;

type ReferenceEye = (typeof reference.eyes)[number];
interface ReferenceResult {
  elp: number;
  power_emmetropia: number;
  power_target: number;
  ref: number[];
}

const formulaOf: Record<string, FormulaId> = {
  srkt: 'srkt',
  t2: 't2',
  holladay1: 'holladay1',
  hofferq: 'hofferQ',
  haigis: 'haigis',
};
const variants: Record<string, FormulaOptions> = {
  plain: {},
  triple: {},
  abs: { srktNegativeRadicand: 'absolute' },
  wk2011: { axialLengthAdjustment: 'wangKoch2011' },
  wk2018: { axialLengthAdjustment: 'wangKoch2018' },
};

function geometryOf(eye: ReferenceEye): EyeGeometry {
  return {
    axialLengthMm: eye.al,
    flatRadiusMm: 337.5 / eye.k1,
    steepRadiusMm: 337.5 / eye.k2,
    anteriorChamberDepthMm: eye.acd,
  };
}

function constantsOf(eye: ReferenceEye, formula: FormulaId, variant: string): LensConstants {
  const [a0Mm = NaN, a1 = NaN, a2 = NaN] = variant === 'triple' ? eye.haigis_triple : eye.haigis_single;
  const constants: Record<FormulaId, LensConstants> = {
    srkt: { aConstant: eye.A },
    t2: { aConstant: eye.A },
    holladay1: { surgeonFactorMm: eye.SF },
    hofferQ: { pAcdMm: eye.pACD },
    haigis: { a0Mm, a1, a2 },
  };
  return constants[formula];
}

const cases = reference.eyes.flatMap((eye) =>
  Object.entries(eye.out as unknown as Record<string, ReferenceResult>).map(([key, expected]) => {
    const [name = '', variant = 'plain'] = key.split('_');
    return { name: `${eye.id} ${key}`, eye, expected, formula: formulaOf[name]!, variant };
  }),
);
/** Here the SRK/T line of 2011 would lengthen the eye: the reference applies it, the house does not. */
const isHeld = (name: string) => name === 'E003 srkt_wk2011';

function expectAsReference(
  { eye, expected, formula, variant }: (typeof cases)[number],
  geometry = geometryOf(eye),
) {
  const options = { ...variants[variant], vertexMm: eye.vertex };
  const prepared = prepareFormula(formula, geometry, constantsOf(eye, formula, variant), options);
  const differences = [
    prepared.elpMm - expected.elp,
    prepared.powerAt(0) - expected.power_emmetropia,
    prepared.powerAt(eye.target) - expected.power_target,
    ...eye.iol_powers.map((powerD, index) => prepared.refractionAt(powerD) - expected.ref[index]!),
  ];
  expect(differences).toHaveLength(5);
  expect(Math.max(...differences.map(Math.abs))).toBeLessThan(TOLERANCE);
  return prepared;
}

describe('the independent reference', () => {
  it('has all 20 eyes and every formula for each', () => {
    expect(reference.eyes).toHaveLength(20);
    expect(cases).toHaveLength(210);
    expect(reference.about).toContain('Not a published standard');
  });

  it.each(cases.filter(({ name }) => !isHeld(name)))('agrees on $name', (each) => {
    expectAsReference(each);
  });

  it('differs only where the Wang-Koch line would lengthen the eye, and there agrees with the measured length', () => {
    const held = cases.find(({ name }) => isHeld(name))!;
    const line = wangKochLines.wangKoch2011.srkt!;
    const lengthenedMm = line.slope * held.eye.al + line.interceptMm;

    expect(lengthenedMm).toBeGreaterThan(held.eye.al);
    expectAsReference(
      { ...held, variant: 'plain' },
      { ...geometryOf(held.eye), axialLengthMm: lengthenedMm },
    );
    const plain = { ...held, expected: held.eye.out.srkt, variant: 'wk2011' };
    const codes = expectAsReference(plain).notices.map((notice) => notice.code);
    expect(codes).toEqual(['axial-length-adjustment-held']);
  });

  it.each(reference.eyes)('notices the same branches for $id', (eye) => {
    const codes = (formula: FormulaId) =>
      prepareFormula(formula, geometryOf(eye), constantsOf(eye, formula, 'plain')).notices.map((n) => n.code);

    expect(codes('srkt').includes('srkt-negative-radicand')).toBe(eye.flags.srkt_radicand_negative);
    expect(codes('holladay1').includes('holladay1-radius-floor')).toBe(eye.flags.holladay1_rag_floor);
    expect(codes('holladay1').includes('holladay1-angle-cap')).toBe(eye.flags.holladay1_ag_cap);
    expect(codes('hofferQ').includes('hofferQ-axial-length-clamp')).toBe(eye.flags.hofferq_al_clamped);
    expect(correctedAxialLengthMm(eye.al) !== eye.al).toBe(eye.flags.srkt_lcor_quadratic);
  });
});

describe('the independent reference for toric lenses (Holladay 1)', () => {
  const toricEyes = reference.eyes.flatMap((eye) =>
    'toric' in eye && eye.toric !== undefined ? [{ id: eye.id, eye, toric: eye.toric }] : [],
  );

  const questionOf = (eye: ReferenceEye, toric: (typeof toricEyes)[number]['toric']) =>
    ({
      formula: 'holladay1',
      eye: geometryOf(eye),
      steepAxisDeg: eye.steep_axis,
      constants: { surgeonFactorMm: eye.SF },
      siaD: 0,
      incisionAxisDeg: toric.incision_axis,
      posteriorCornea: 'none',
      lens: { powerD: toric.toric_iol.se, cylinderD: toric.toric_iol.cyl, axisDeg: toric.toric_iol.axis },
      options: { vertexMm: eye.vertex },
    }) as const;

  it('holds five toric eyes', () => expect(toricEyes).toHaveLength(5));

  it.each(toricEyes)('agrees on the cornea after incision and posterior cornea for $id', ({ eye, toric }) => {
    const question = { ...questionOf(eye, toric), siaD: toric.sia };

    const anterior = planToric(question);
    const total = planToric({ ...question, posteriorCornea: 'abulafiaKoch2016' });

    expect(anterior.cornealCylinderD).toBeCloseTo(toric.astig_after_sia[0]!, 5.7);
    expect(anterior.steepAxisDeg).toBeCloseTo(toric.astig_after_sia[1]!, 5.7);
    expect(total.cornealCylinderD).toBeCloseTo(toric.abulafia_koch[0]!, 5.7);
    expect(total.idealAxisDeg).toBeCloseTo(toric.abulafia_koch[1]!, 5.7);
  });

  it.each(toricEyes)('agrees on cylinder, ratio and residual for $id', ({ eye, toric }) => {
    const plan = planToric(questionOf(eye, toric));

    expect(plan.fullCorrectionCylinderD).toBeCloseTo(toric.iol_plane_cyl_full, 5.7);
    expect(plan.planeRatio).toBeCloseTo(toric.plane_ratio, 5.7);
    expect(plan.residual.sphereD).toBeCloseTo(toric.residual_sca[0]!, 5.7);
    expect(plan.residual.cylinderD).toBeCloseTo(toric.residual_sca[1]!, 5.7);
    expect(plan.residual.axisDeg).toBeCloseTo(toric.residual_sca[2]!, 4);
  });
});
