/**
 * Patients and their two eyes.
 */
import { z } from 'zod';
import {
  idSchema,
  isoDateSchema,
  isoInstantSchema,
  lineOf,
  requiredLineOf,
  sideSchema,
  textOf,
  versionSchema,
} from './common';

export const SEXES = ['female', 'male', 'other', 'unknown'] as const;
export const RECORD_NUMBER_MAX_LENGTH = 40;
export const NAME_MAX_LENGTH = 100;
export const OLDEST_BIRTH_DATE = '1900-01-01';

/** A birth date lies between 1900 and today. `today` is ISO; comparison of ISO dates is text comparison. */
export function isPlausibleBirthDate(birthDate: string, today: string): boolean {
  return birthDate >= OLDEST_BIRTH_DATE && birthDate <= today;
}

export const patientInputSchema = z.object({
  recordNumber: requiredLineOf(RECORD_NUMBER_MAX_LENGTH, 'Record number'),
  familyName: requiredLineOf(NAME_MAX_LENGTH, 'Family name'),
  givenName: requiredLineOf(NAME_MAX_LENGTH, 'Given name'),
  birthDate: isoDateSchema.refine(
    (date) => isPlausibleBirthDate(date, new Date().toISOString().slice(0, 10)),
    'Birth date must lie between 1900 and today',
  ),
  sex: z.enum(SEXES),
});
export type PatientInput = z.infer<typeof patientInputSchema>;

export const patientSchema = patientInputSchema.extend({
  id: idSchema,
  birthDate: isoDateSchema,
  isDemo: z.boolean(),
  createdAt: isoInstantSchema,
  version: versionSchema,
});
export type Patient = z.infer<typeof patientSchema>;

/** Where an eye stands on its way: measure, check, plan, sign, (talk, theatre, refraction, learn follow). */
export const EYE_STAGES = ['measure', 'check', 'plan', 'sign', 'signed', 'out-of-date'] as const;
export type EyeStage = (typeof EYE_STAGES)[number];
export const EYE_STAGE_WORDS: Record<EyeStage, string> = {
  measure: 'Waits for a measurement',
  check: 'Has a stop to settle',
  plan: 'Waits for a plan',
  sign: 'Draft waits for a signature',
  signed: 'Plan signed',
  'out-of-date': 'Signed plan is out of date',
};

export const eyeSummarySchema = z.object({
  side: sideSchema,
  stage: z.enum(EYE_STAGES),
  waitsFor: z.string(),
});
export type EyeSummary = z.infer<typeof eyeSummarySchema>;
export const patientListItemSchema = patientSchema.extend({ eyes: z.array(eyeSummarySchema) });
export type PatientListItem = z.infer<typeof patientListItemSchema>;

/** One patient as its own page shows it. */
export const patientDetailSchema = patientListItemSchema.extend({
  /** Others with the same name and birth date: a note, never a refusal. */
  possibleDuplicates: z.array(
    patientSchema.pick({ id: true, recordNumber: true, familyName: true, givenName: true }),
  ),
});
export type PatientDetail = z.infer<typeof patientDetailSchema>;

export const CORNEAL_SURGERY_ANSWERS = ['no', 'yes', 'unknown'] as const;
export const CORNEAL_SURGERY_KINDS = [
  'myopic-laser',
  'hyperopic-laser',
  'radial-keratotomy',
  'keratoplasty',
  'other',
] as const;
export const LENS_STATUSES = ['phakic', 'pseudophakic', 'aphakic', 'phakic-lens'] as const;
export const VITREOUS_STATUSES = ['vitreous', 'silicone-oil', 'gas', 'unknown'] as const;

/** Facts that calculations need. `null` means nobody has answered yet, which is not the same as "unknown". */
export const eyeHistorySchema = z
  .object({
    cornealSurgery: z.enum(CORNEAL_SURGERY_ANSWERS).nullable(),
    cornealSurgeryKind: z.enum(CORNEAL_SURGERY_KINDS).nullable(),
    lensStatus: z.enum(LENS_STATUSES).nullable(),
    vitreousStatus: z.enum(VITREOUS_STATUSES).nullable(),
    remarks: textOf(500, 'Remarks'),
  })
  .refine((history) => history.cornealSurgeryKind === null || history.cornealSurgery === 'yes', {
    path: ['cornealSurgeryKind'],
    message: 'A kind of corneal surgery needs the answer "yes"',
  });
export type EyeHistory = z.infer<typeof eyeHistorySchema>;

export const eyeSchema = z.object({
  id: idSchema,
  patientId: idSchema,
  side: sideSchema,
  history: eyeHistorySchema,
  version: versionSchema,
});
export type Eye = z.infer<typeof eyeSchema>;

export const patientQuerySchema = z.object({
  /** Name, record number or birth date (YYYY-MM-DD). */
  search: lineOf(100).optional(),
});
