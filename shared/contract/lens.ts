/**
 * Lens catalogue: models, their powers, and constants per formula with where they come from.
 */
import { z } from 'zod';
import { rowProblemSchema } from './biometry-import';
import { idSchema, isoDateSchema, isoInstantSchema, lineOf, requiredLineOf, versionSchema } from './common';
import { CONSTANT_ORIGINS } from './measurement';
import { fieldErrorSchema } from './problem';

export const LENS_KINDS = ['monofocal', 'monofocal-plus', 'extended-depth-of-focus', 'multifocal'] as const;
export type LensKind = (typeof LENS_KINDS)[number];
export const LENS_KIND_NAMES: Record<LensKind, string> = {
  monofocal: 'Monofocal',
  'monofocal-plus': 'Monofocal-plus',
  'extended-depth-of-focus': 'Extended depth of focus',
  multifocal: 'Multifocal',
};
export const LENS_DESIGNS = ['one-piece', 'three-piece', 'anterior-chamber'] as const;
export type LensDesign = (typeof LENS_DESIGNS)[number];
export const LENS_DESIGN_NAMES: Record<LensDesign, string> = {
  'one-piece': 'One-piece',
  'three-piece': 'Three-piece',
  'anterior-chamber': 'Anterior chamber',
};

export const FORMULA_IDS = ['srkt', 't2', 'holladay1', 'hofferQ', 'haigis'] as const;
export const formulaIdSchema = z.enum(FORMULA_IDS);
export const FORMULA_NAMES: Record<(typeof FORMULA_IDS)[number], string> = {
  srkt: 'SRK/T',
  t2: 'T2',
  holladay1: 'Holladay 1',
  hofferQ: 'Hoffer Q',
  haigis: 'Haigis',
};

/** Outside these a constant is a typing error, or a constant of something else. */
export const CONSTANT_LIMITS = {
  aConstant: { min: 100, max: 130 },
  surgeonFactorMm: { min: -3, max: 6 },
  pAcdMm: { min: 1, max: 9 },
  a0Mm: { min: -10, max: 10 },
  a1: { min: -2, max: 2 },
  a2: { min: -2, max: 2 },
} as const;
const constantNumber = (key: keyof typeof CONSTANT_LIMITS) =>
  z.number().min(CONSTANT_LIMITS[key].min).max(CONSTANT_LIMITS[key].max);

/** Same shapes as the door of `formulas/`. */
export const constantValuesSchema = z.union([
  z.strictObject({ aConstant: constantNumber('aConstant') }),
  z.strictObject({ surgeonFactorMm: constantNumber('surgeonFactorMm') }),
  z.strictObject({ pAcdMm: constantNumber('pAcdMm') }),
  z.strictObject({ a0Mm: constantNumber('a0Mm'), a1: constantNumber('a1'), a2: constantNumber('a2') }),
]);
export type ConstantValues = z.infer<typeof constantValuesSchema>;

/** Which shape a formula takes. SRK/T and T2 share the A-constant, kept apart so that each can be personalised. */
export const CONSTANT_KEYS: Record<(typeof FORMULA_IDS)[number], readonly string[]> = {
  srkt: ['aConstant'],
  t2: ['aConstant'],
  holladay1: ['surgeonFactorMm'],
  hofferQ: ['pAcdMm'],
  haigis: ['a0Mm', 'a1', 'a2'],
};

export const lensConstantSchema = z
  .object({
    formula: formulaIdSchema,
    origin: z.enum(CONSTANT_ORIGINS),
    values: constantValuesSchema,
    /** Whose: `published by the maker`, `invented for the demonstration`, … */
    source: requiredLineOf(200, 'Source'),
    dated: isoDateSchema,
  })
  .refine(
    (constant) =>
      Object.keys(constant.values).sort().join() === [...CONSTANT_KEYS[constant.formula]].sort().join(),
    {
      path: ['values'],
      message: 'These constants do not belong to this formula',
    },
  );
export type LensConstant = z.infer<typeof lensConstantSchema>;

/** Powers from..to in steps; a model may have coarse steps at its ends. */
export const powerRangeSchema = z
  .object({
    fromD: z.number().min(-20).max(60),
    toD: z.number().min(-20).max(60),
    stepD: z.number().min(0.05).max(5),
  })
  .refine((range) => range.toD >= range.fromD, { path: ['toD'], message: 'The range ends before it begins' })
  .refine(
    (range) =>
      Math.abs(
        Math.round((range.toD - range.fromD) / range.stepD) * range.stepD - (range.toD - range.fromD),
      ) < 1e-6,
    {
      path: ['stepD'],
      message: 'The step does not divide the range',
    },
  );
export type PowerRange = z.infer<typeof powerRangeSchema>;

const lensInputShape = {
  name: requiredLineOf(100, 'Name'),
  kind: z.enum(LENS_KINDS),
  isToric: z.boolean(),
  design: z.enum(LENS_DESIGNS),
  powerRanges: z.array(powerRangeSchema).min(1, 'Give at least one range of powers').max(6),
  /** Cylinder at the lens plane, D, positive, rising; empty unless toric. */
  cylinderStepsD: z.array(z.number().positive().max(15)).max(30),
  constants: z.array(lensConstantSchema).max(20),
  remarks: lineOf(300, 'Remarks'),
  /** A retired model stays on old plans and is not offered for new ones. */
  isRetired: z.boolean(),
};
export const lensInputSchema = z
  .object(lensInputShape)
  .refine((lens) => lens.isToric === lens.cylinderStepsD.length > 0, {
    path: ['cylinderStepsD'],
    message: 'A toric model has cylinder steps, and only a toric model',
  })
  .refine(
    (lens) => new Set(lens.constants.map((c) => `${c.formula}/${c.origin}`)).size === lens.constants.length,
    {
      path: ['constants'],
      message: 'Two sets of constants for the same formula and origin',
    },
  );
export type LensInput = z.infer<typeof lensInputSchema>;

export const lensSchema = z.object({
  ...lensInputShape,
  id: idSchema,
  isDemo: z.boolean(),
  version: versionSchema,
});
export type Lens = z.infer<typeof lensSchema>;

/** CSV columns of the catalogue; one line per model and origin. Ranges: `5:10:1 10:30:0.5`, cylinders: `1 1.5 2.25`. */
export const LENS_COLUMNS = [
  'name',
  'kind',
  'toric',
  'design',
  'power_ranges_d',
  'cylinder_steps_d',
  'constants_origin',
  'constants_source',
  'constants_dated',
  'a_constant',
  't2_a_constant',
  'surgeon_factor_mm',
  'pacd_mm',
  'haigis_a0_mm',
  'haigis_a1',
  'haigis_a2',
  'remarks',
] as const;

/** A set of constants as it was recorded; `replacedAt` is null for the one in use. */
export const recordedConstantSchema = z.object({
  formula: formulaIdSchema,
  origin: z.enum(CONSTANT_ORIGINS),
  values: constantValuesSchema,
  source: z.string(),
  dated: isoDateSchema,
  recordedAt: isoInstantSchema,
  recordedBy: z.string(),
  replacedAt: isoInstantSchema.nullable(),
});
export type RecordedConstant = z.infer<typeof recordedConstantSchema>;

/** One model as its own page shows it. */
export const lensDetailSchema = lensSchema.extend({
  /** Every set of constants that ever was in use, newest first. */
  constantHistory: z.array(recordedConstantSchema),
});
export type LensDetail = z.infer<typeof lensDetailSchema>;

export const LENS_IMPORT_MAX_BYTES = 1024 * 1024;
export const LENS_ROW_OUTCOMES = ['created', 'changed', 'already-there', 'refused'] as const;
export type LensRowOutcome = (typeof LENS_ROW_OUTCOMES)[number];
export const lensImportQuerySchema = z.object({ dryRun: z.enum(['0', '1']).optional() });

/** What a catalogue file does, line by line. Nothing is stored while any line is refused. */
export const lensImportResultSchema = z.object({
  isStored: z.boolean(),
  rows: z.array(
    z.object({
      row: z.number().int(),
      name: z.string(),
      outcome: z.enum(LENS_ROW_OUTCOMES),
      summary: z.string(),
      problems: z.array(rowProblemSchema),
    }),
  ),
  counts: z.object({
    created: z.number().int(),
    changed: z.number().int(),
    alreadyThere: z.number().int(),
    refused: z.number().int(),
  }),
  /** Why the file as a whole was refused. */
  problems: z.array(fieldErrorSchema),
});
export type LensImportResult = z.infer<typeof lensImportResultSchema>;
