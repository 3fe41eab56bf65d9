/**
 * Biometry of one eye: the values, their limits, and the way back to where they came from.
 * A measurement is never edited: it is superseded by another, with a reason.
 */
import { z } from 'zod';
import { idSchema, isoDateSchema, isoInstantSchema, sideSchema, textOf } from './common';

export const METHODS = ['optical', 'immersion', 'contact'] as const;
export type Method = (typeof METHODS)[number];
export const METHOD_NAMES: Record<Method, string> = {
  optical: 'Optical',
  immersion: 'Ultrasound, immersion',
  contact: 'Ultrasound, contact',
};
/** Optical and ultrasound constants are never mixed: the retina is met at another layer. */
export const CONSTANT_ORIGINS = ['optical', 'ultrasound'] as const;
export type ConstantOrigin = (typeof CONSTANT_ORIGINS)[number];
export const originForMethod = (method: Method): ConstantOrigin =>
  method === 'optical' ? 'optical' : 'ultrasound';

export const ACD_FROM = ['epithelium', 'endothelium'] as const;
export const ACD_FROM_NAMES: Record<(typeof ACD_FROM)[number], string> = {
  epithelium: 'front of the cornea (epithelium)',
  endothelium: 'back of the cornea (endothelium)',
};

const optionalNumber = z.number().nullable();

export const measurementValuesSchema = z.object({
  measuredAt: isoDateSchema,
  method: z.enum(METHODS),
  device: z.string(),
  axialLengthMm: z.number(),
  axialLengthSdMm: optionalNumber,
  /** Radii are the ground truth for calculation: given, or from the power and its declared index. */
  flatRadiusMm: z.number(),
  steepRadiusMm: z.number(),
  /** Powers as they were given; null when only radii were. */
  flatKD: optionalNumber,
  steepKD: optionalNumber,
  keratometricIndex: optionalNumber,
  flatAxisDeg: optionalNumber,
  steepAxisDeg: optionalNumber,
  acdMm: optionalNumber,
  acdFrom: z.enum(ACD_FROM).nullable(),
  lensThicknessMm: optionalNumber,
  cornealThicknessUm: optionalNumber,
  whiteToWhiteMm: optionalNumber,
  pupilMm: optionalNumber,
  operator: z.string(),
  remarks: z.string(),
});
export type MeasurementValues = z.infer<typeof measurementValuesSchema>;

export const provenanceSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('file'),
    importId: idSchema,
    fileName: z.string(),
    /** Line of the record in the file, the header being row 1. */
    row: z.number().int(),
    /** The record as it stood in the file, by column name. */
    raw: z.record(z.string(), z.string()),
  }),
  z.object({ kind: z.literal('manual'), enteredBy: z.string() }),
]);
export type Provenance = z.infer<typeof provenanceSchema>;

export const measurementSchema = z.object({
  id: idSchema,
  patientId: idSchema,
  side: sideSchema,
  values: measurementValuesSchema,
  provenance: provenanceSchema,
  createdAt: isoInstantSchema,
  createdBy: z.string(),
  supersededById: idSchema.nullable(),
  supersededReason: z.string().nullable(),
  /** True for the newest measurement that nothing supersedes: the one a new plan starts from. */
  isOfRecord: z.boolean(),
});
export type Measurement = z.infer<typeof measurementSchema>;

export interface MeasurementField {
  /** Column of the CSV template. */
  column: TemplateColumn;
  field: keyof MeasurementValues;
  label: string;
  unit: string;
  /** Hard limits, clinical plausibility: outside is a typing or unit error (common practice, clinical rules 1.4). */
  min: number;
  max: number;
}

/** Numeric fields of the template, with the hard limits that refuse typing and unit errors. */
export const MEASUREMENT_FIELDS: readonly MeasurementField[] = [
  { column: 'axial_length_mm', field: 'axialLengthMm', label: 'Axial length', unit: 'mm', min: 14, max: 40 },
  {
    column: 'axial_length_sd_mm',
    field: 'axialLengthSdMm',
    label: 'Axial length SD',
    unit: 'mm',
    min: 0,
    max: 2,
  },
  { column: 'flat_k_d', field: 'flatKD', label: 'Flat keratometry', unit: 'D', min: 25, max: 75 },
  { column: 'flat_axis_deg', field: 'flatAxisDeg', label: 'Flat axis', unit: '°', min: 0, max: 180 },
  { column: 'steep_k_d', field: 'steepKD', label: 'Steep keratometry', unit: 'D', min: 25, max: 75 },
  { column: 'steep_axis_deg', field: 'steepAxisDeg', label: 'Steep axis', unit: '°', min: 0, max: 180 },
  {
    column: 'keratometric_index',
    field: 'keratometricIndex',
    label: 'Keratometric index',
    unit: '',
    min: 1.3,
    max: 1.4,
  },
  { column: 'flat_radius_mm', field: 'flatRadiusMm', label: 'Flat radius', unit: 'mm', min: 4.5, max: 13.5 },
  {
    column: 'steep_radius_mm',
    field: 'steepRadiusMm',
    label: 'Steep radius',
    unit: 'mm',
    min: 4.5,
    max: 13.5,
  },
  { column: 'acd_mm', field: 'acdMm', label: 'Anterior chamber depth', unit: 'mm', min: 1, max: 6 },
  {
    column: 'lens_thickness_mm',
    field: 'lensThicknessMm',
    label: 'Lens thickness',
    unit: 'mm',
    min: 2,
    max: 8,
  },
  {
    column: 'corneal_thickness_um',
    field: 'cornealThicknessUm',
    label: 'Corneal thickness',
    unit: 'µm',
    min: 250,
    max: 900,
  },
  {
    column: 'white_to_white_mm',
    field: 'whiteToWhiteMm',
    label: 'White-to-white',
    unit: 'mm',
    min: 8,
    max: 15,
  },
  { column: 'pupil_mm', field: 'pupilMm', label: 'Pupil', unit: 'mm', min: 0.5, max: 10 },
];

/** The template's header, in order. */
export const TEMPLATE_COLUMNS = [
  'record_number',
  'family_name',
  'given_name',
  'birth_date',
  'sex',
  'side',
  'measured_at',
  'method',
  'device',
  'axial_length_mm',
  'axial_length_sd_mm',
  'flat_k_d',
  'flat_axis_deg',
  'steep_k_d',
  'steep_axis_deg',
  'keratometric_index',
  'flat_radius_mm',
  'steep_radius_mm',
  'acd_mm',
  'acd_from',
  'lens_thickness_mm',
  'corneal_thickness_um',
  'white_to_white_mm',
  'pupil_mm',
  'operator',
  'remarks',
] as const;
export type TemplateColumn = (typeof TEMPLATE_COLUMNS)[number];

/** Flags of the check step: each from a published criterion or common practice, never hidden. */
export const SEVERITIES = ['stop', 'weigh', 'note'] as const;
export type Severity = (typeof SEVERITIES)[number];
export const flagSchema = z.object({
  /** Stable id of the rule: `axial-length-outlier`. */
  ruleId: z.string(),
  severity: z.enum(SEVERITIES),
  message: z.string(),
  /** What to do about it. */
  advice: z.string(),
  source: z.string(),
  mark: z.enum(['V', 'V*', 'N', 'M', 'CP', 'D']),
  /** False for a stop that no reason can make up for: what it rests on has to change. */
  canBeSettled: z.boolean(),
  settlement: z.object({ by: z.string(), at: isoInstantSchema, reason: z.string() }).nullable(),
});
export type Flag = z.infer<typeof flagSchema>;
export const settlementInputSchema = z.object({
  ruleId: z.string().max(60),
  measurementId: idSchema.nullable(),
  reason: textOf(500, 'Reason').pipe(z.string().min(5, 'Give a reason of a few words')),
});
export type SettlementInput = z.infer<typeof settlementInputSchema>;
