/**
 * The plan of one eye: its inputs, what is calculated from them, and the signed snapshot.
 */
import { z } from 'zod';
import { eyeSchema, patientSchema } from './patient';
import { flagSchema, measurementSchema, METHODS } from './measurement';
import { constantValuesSchema, formulaIdSchema, lensSchema } from './lens';
import {
  idSchema,
  isoDateSchema,
  isoInstantSchema,
  lineOf,
  pageOf,
  pageQuerySchema,
  sideSchema,
  textOf,
  versionSchema,
} from './common';

export const PLAN_STATUSES = ['draft', 'signed', 'replaced', 'discarded'] as const;
export const TARGET_LIMITS_D = { min: -6, max: 3 } as const;
export const TOLERANCES_D = [0.25, 0.5, 0.75, 1] as const;
export const AXIAL_LENGTH_ADJUSTMENTS = ['none', 'wangKoch2011', 'wangKoch2018'] as const;
export const MAX_LENSES_IN_PLAN = 4;

/** What the surgeon decides before the calculation. */
export const planInputSchema = z.object({
  measurementId: idSchema,
  targetD: z
    .number()
    .min(TARGET_LIMITS_D.min, 'Target below −6 D')
    .max(TARGET_LIMITS_D.max, 'Target above +3 D'),
  toleranceD: z.union(
    TOLERANCES_D.map((d) => z.literal(d)) as [
      z.ZodLiteral<0.25>,
      z.ZodLiteral<0.5>,
      z.ZodLiteral<0.75>,
      z.ZodLiteral<1>,
    ],
  ),
  formulas: z.array(formulaIdSchema).min(1, 'Choose at least one formula'),
  /** The formula whose landing is shown and signed; null = the one suggested. */
  leadingFormula: formulaIdSchema.nullable(),
  lensIds: z.array(idSchema).min(1, 'Choose at least one lens model').max(MAX_LENSES_IN_PLAN),
  axialLengthAdjustment: z.enum(AXIAL_LENGTH_ADJUSTMENTS),
  note: textOf(1000, 'Note'),
});
export type PlanInput = z.infer<typeof planInputSchema>;

export const planChoiceSchema = z.object({ lensId: idSchema, powerD: z.number().min(-20).max(60) });
export type PlanChoice = z.infer<typeof planChoiceSchema>;

/** A change of a draft: inputs, and the chosen lens and power (null while undecided). */
export const planChangeSchema = planInputSchema.extend({ choice: planChoiceSchema.nullable() });
export type PlanChange = z.infer<typeof planChangeSchema>;

export const noticeSchema = z.object({ code: z.string(), message: z.string() });

export const predictionSchema = z.object({
  formula: formulaIdSchema,
  refractionD: z.number(),
  elpMm: z.number(),
  notices: z.array(noticeSchema),
});
export type Prediction = z.infer<typeof predictionSchema>;

export const landingSchema = z.object({
  meanD: z.number(),
  sdD: z.number(),
  /** Probability 0..1 that the refraction comes out within the plan's tolerance of the target. */
  chance: z.number(),
});

export const candidateSchema = z.object({
  powerD: z.number(),
  predictions: z.array(predictionSchema),
  lowestD: z.number(),
  highestD: z.number(),
  landing: landingSchema,
  /** The candidate with the best chance of landing, one per model. The choice stays with the surgeon. */
  isClosest: z.boolean(),
});
export type Candidate = z.infer<typeof candidateSchema>;

/** A formula that gives no result here, and why. */
export const silencedSchema = z.object({ formula: formulaIdSchema, code: z.string(), reason: z.string() });
export type Silenced = z.infer<typeof silencedSchema>;

export const usedConstantSchema = z.object({
  formula: formulaIdSchema,
  origin: z.enum(['optical', 'ultrasound']),
  values: constantValuesSchema,
  source: z.string(),
  dated: isoDateSchema,
});

export const modelCalculationSchema = z.object({
  lensId: idSchema,
  lensName: z.string(),
  constants: z.array(usedConstantSchema),
  silenced: z.array(silencedSchema),
  /** The formula whose landing the chart shows; null when every formula is silent. */
  leadingFormula: formulaIdSchema.nullable(),
  /** Power for the target by formula, before rounding to the model's steps. */
  exactPowers: z.array(z.object({ formula: formulaIdSchema, powerD: z.number(), elpMm: z.number() })),
  /** From higher to lower power. Empty when every formula is silent. */
  candidates: z.array(candidateSchema),
  /** Parts of the spread at the closest power, largest first. */
  spreadParts: z.array(z.object({ source: z.string(), sdD: z.number() })),
  notices: z.array(noticeSchema),
});
export type ModelCalculation = z.infer<typeof modelCalculationSchema>;

export const suggestionSchema = z.object({
  formulas: z.array(formulaIdSchema),
  reason: z.string(),
  source: z.string(),
  mark: z.string(),
});

/** What the formulas actually received. */
export const usedEyeSchema = z.object({
  axialLengthMm: z.number(),
  flatRadiusMm: z.number(),
  steepRadiusMm: z.number(),
  meanKeratometryD: z.number(),
  cornealCylinderD: z.number(),
  steepAxisDeg: z.number().nullable(),
  anteriorChamberDepthMm: z.number().nullable(),
  method: z.enum(METHODS),
});

export const planCalculationSchema = z.object({
  formulaVersion: z.string(),
  eye: usedEyeSchema,
  targetD: z.number(),
  toleranceD: z.number(),
  suggestion: suggestionSchema,
  models: z.array(modelCalculationSchema),
  flags: z.array(flagSchema),
});
export type PlanCalculation = z.infer<typeof planCalculationSchema>;

/** Everything a signature freezes; its canonical JSON is what the digest is taken of. */
export const planSnapshotSchema = z.object({
  schema: z.literal(1),
  planId: idSchema,
  sequence: z.number().int(),
  practiceName: z.string(),
  patient: patientSchema,
  eye: eyeSchema,
  measurement: measurementSchema,
  input: planInputSchema,
  lenses: z.array(lensSchema),
  calculation: planCalculationSchema,
  choice: planChoiceSchema,
  chosenLensName: z.string(),
  chosenCandidate: candidateSchema,
  /** Rule ids of the weigh flags that were read and accepted at signing. */
  acknowledgedRuleIds: z.array(z.string()),
  signedBy: z.object({ id: idSchema, displayName: z.string() }),
  signedAt: isoInstantSchema,
});
export type PlanSnapshot = z.infer<typeof planSnapshotSchema>;

export const planSchema = z.object({
  id: idSchema,
  patientId: idSchema,
  side: sideSchema,
  /** 1, 2, 3 … per eye, printed on the sheet. */
  sequence: z.number().int(),
  status: z.enum(PLAN_STATUSES),
  input: planInputSchema,
  choice: planChoiceSchema.nullable(),
  createdBy: z.string(),
  createdAt: isoInstantSchema,
  signedBy: z.string().nullable(),
  signedAt: isoInstantSchema.nullable(),
  /** SHA-256 of the signed snapshot, hex. */
  digest: z.string().nullable(),
  /** Why a signed plan no longer matches its inputs; empty when it does. */
  outOfDateReasons: z.array(z.string()),
  version: versionSchema,
});
export type Plan = z.infer<typeof planSchema>;

/** Everything the planning screen needs, in one read. For a signed plan the calculation is the frozen one. */
export const planDeskSchema = z.object({
  plan: planSchema,
  patient: patientSchema,
  eye: eyeSchema,
  measurement: measurementSchema,
  /** Measurements of this eye that a draft may use, newest first. */
  measurements: z.array(measurementSchema),
  /** Models a draft may use. */
  lenses: z.array(lensSchema),
  calculation: planCalculationSchema,
  /** What stands between this draft and a signature, in words. Empty when it can be signed. */
  blockers: z.array(z.string()),
  /** Of everything shown here that a signature would freeze; signing sends it back. */
  shownDigest: z.string(),
});
export type PlanDesk = z.infer<typeof planDeskSchema>;

export const signPlanSchema = z.object({
  /** The version that was on the screen: nobody signs what somebody else changed meanwhile. */
  version: versionSchema,
  /** `shownDigest` of the desk that was on the screen: constants or flags may have changed without the draft. */
  shownDigest: z.string().max(64),
  password: z.string().min(1, 'Type your password').max(200),
  /** The second, deliberate act: the side in words, typed or chosen anew. */
  confirmedSide: sideSchema,
  /** Rule ids of the weigh flags that the surgeon has read. */
  acknowledgedRuleIds: z.array(z.string().max(60)).max(60),
});

export type SignPlan = z.infer<typeof signPlanSchema>;

/** What a new draft may be given; the rest starts from the practice's usual values. */
export const newPlanSchema = planInputSchema.partial();
export type NewPlan = z.infer<typeof newPlanSchema>;

export const planListQuerySchema = pageQuerySchema.extend({
  status: z.enum(PLAN_STATUSES).optional(),
  search: lineOf(100).optional(),
});

/** A line of the list of signed plans, with the choice in plain words. */
export const planListItemSchema = z.object({
  id: idSchema,
  patientId: idSchema,
  patientName: z.string(),
  recordNumber: z.string(),
  birthDate: isoDateSchema,
  side: sideSchema,
  sequence: z.number().int(),
  status: z.enum(PLAN_STATUSES),
  lensName: z.string().nullable(),
  powerD: z.number().nullable(),
  targetD: z.number(),
  chance: z.number().nullable(),
  toleranceD: z.number(),
  plainWords: z.string(),
  signedBy: z.string().nullable(),
  signedAt: isoInstantSchema.nullable(),
  outOfDateReasons: z.array(z.string()),
});
export type PlanListItem = z.infer<typeof planListItemSchema>;
export const planPageSchema = pageOf(planListItemSchema);

/** One eye's page: everything known about it and where it stands. */
export const eyeDeskSchema = z.object({
  patient: patientSchema,
  eye: eyeSchema,
  fellowEye: eyeSchema,
  measurements: z.array(measurementSchema),
  fellowMeasurement: measurementSchema.nullable(),
  flags: z.array(flagSchema),
  plans: z.array(planListItemSchema),
  stage: z.string(),
  waitsFor: z.string(),
});
export type EyeDesk = z.infer<typeof eyeDeskSchema>;

/** Home: what waits for me. */
export const homeSchema = z.object({
  sections: z.array(
    z.object({
      id: z.string(),
      title: z.string(),
      /** How an empty section is filled. */
      emptyHint: z.string(),
      total: z.number().int(),
      items: z.array(
        z.object({ title: z.string(), detail: z.string(), href: z.string(), side: sideSchema.nullable() }),
      ),
    }),
  ),
});
export type Home = z.infer<typeof homeSchema>;
