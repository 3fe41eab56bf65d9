/**
 * Upload of a biometry file: checked first, stored only after confirmation.
 */
import { z } from 'zod';
import { fieldErrorSchema } from './problem';
import { idSchema, isoInstantSchema, pageOf } from './common';

export const IMPORT_MAX_BYTES = 20 * 1024 * 1024;
export const IMPORT_MAX_ROWS = 50_000;

/** `checking` and `storing` carry progress; `refused` means the file as a whole could not be read. */
export const IMPORT_STATUSES = ['checking', 'ready', 'storing', 'stored', 'refused', 'discarded'] as const;

export const ROW_OUTCOMES = ['created', 'already-there', 'refused'] as const;
export type RowOutcome = (typeof ROW_OUTCOMES)[number];

export const importSchema = z.object({
  id: idSchema,
  fileName: z.string(),
  sizeBytes: z.number().int(),
  sha256: z.string(),
  status: z.enum(IMPORT_STATUSES),
  uploadedBy: z.string(),
  uploadedAt: isoInstantSchema,
  storedBy: z.string().nullable(),
  storedAt: isoInstantSchema.nullable(),
  /** How the file was read, in words: `semicolon, decimal comma, UTF-8 with BOM`. */
  readAs: z.string(),
  progress: z.object({ done: z.number().int(), total: z.number().int() }),
  counts: z.object({
    created: z.number().int(),
    alreadyThere: z.number().int(),
    refused: z.number().int(),
    newPatients: z.number().int(),
  }),
  /** Why the file as a whole was refused. */
  problems: z.array(fieldErrorSchema),
  /** When the same bytes were stored before: that import's id. */
  sameFileAs: idSchema.nullable(),
});
export type BiometryImport = z.infer<typeof importSchema>;

export const rowProblemSchema = z.object({ column: z.string(), value: z.string(), message: z.string() });
export type RowProblem = z.infer<typeof rowProblemSchema>;

export const importRowSchema = z.object({
  row: z.number().int(),
  outcome: z.enum(ROW_OUTCOMES),
  recordNumber: z.string(),
  patientName: z.string(),
  side: z.string(),
  /** What happens, in words: `new patient, right eye`, `same measurement is stored since …`. */
  summary: z.string(),
  problems: z.array(rowProblemSchema),
  /** After storing: where the row went. */
  patientId: idSchema.nullable(),
  measurementId: idSchema.nullable(),
});
export type ImportRow = z.infer<typeof importRowSchema>;
export const importRowPageSchema = pageOf(importRowSchema);
