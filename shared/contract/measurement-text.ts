/**
 * The one reading of a measurement given as text, for the row of a file and for the form alike. Plain code
 * without a schema per field: a file has tens of thousands of rows.
 */
import { z } from 'zod';
import { isCalendarDate, localDateOf } from './calendar';
import { idSchema, textOf } from './common';
import { parseDecimal, toNineDecimals } from './decimal-text';
import { quoted, textProblem } from './free-text';
import {
  ACD_FROM,
  MEASUREMENT_FIELDS,
  METHODS,
  type MeasurementField,
  type MeasurementValues,
  type TemplateColumn,
} from './measurement';
import { readCornea, type Cornea, type CorneaField, type GivenCornea } from './measurement-cornea';
import { unitHint } from './measurement-hints';

export type MeasurementTextField = keyof MeasurementValues;
/** What was typed, by field; a field that is absent was left empty. */
export type MeasurementText = Partial<Record<MeasurementTextField, string>>;

export interface MeasurementReadingOptions {
  /** ISO date; a measurement is never dated later. */
  today: string;
  /** ISO date of birth, where it is known. */
  birthDate?: string;
}
export interface MeasurementProblem {
  field: MeasurementTextField;
  message: string;
}
export type MeasurementReading = { values: MeasurementValues } | { problems: MeasurementProblem[] };

/** Column of the template for each field. */
export const MEASUREMENT_TEXT_COLUMNS: Readonly<Record<MeasurementTextField, TemplateColumn>> = {
  measuredAt: 'measured_at',
  method: 'method',
  device: 'device',
  axialLengthMm: 'axial_length_mm',
  axialLengthSdMm: 'axial_length_sd_mm',
  flatKD: 'flat_k_d',
  flatAxisDeg: 'flat_axis_deg',
  steepKD: 'steep_k_d',
  steepAxisDeg: 'steep_axis_deg',
  keratometricIndex: 'keratometric_index',
  flatRadiusMm: 'flat_radius_mm',
  steepRadiusMm: 'steep_radius_mm',
  acdMm: 'acd_mm',
  acdFrom: 'acd_from',
  lensThicknessMm: 'lens_thickness_mm',
  cornealThicknessUm: 'corneal_thickness_um',
  whiteToWhiteMm: 'white_to_white_mm',
  pupilMm: 'pupil_mm',
  operator: 'operator',
  remarks: 'remarks',
};
export const MEASUREMENT_TEXT_FIELDS = Object.keys(MEASUREMENT_TEXT_COLUMNS) as MeasurementTextField[];

export const DEVICE_MAX_LENGTH = 100;
export const OPERATOR_MAX_LENGTH = 100;
export const REMARKS_MAX_LENGTH = 500;
/** Depth and thickness of the lens together; beyond this one of them is mistyped (common practice). */
export const ACD_AND_LENS_MAX_MM = 11;

/** The values, or everything that is wrong with the text. Never corrects, never guesses. */
export function readMeasurement(
  text: MeasurementText,
  options: MeasurementReadingOptions,
): MeasurementReading {
  const problems: MeasurementProblem[] = [];
  const reader: Reader = {
    text,
    trimmed: (field) => text[field]?.trim() ?? '',
    refuse: (field, message) => problems.push({ field, message }),
  };
  const measuredAt = readDate(reader, options);
  const method = readMethod(reader);
  const device = readText(reader, { field: 'device', name: 'Device', maxLength: DEVICE_MAX_LENGTH });
  const numbers = readNumbers(reader);
  const acdFrom = readAcdFrom(reader, numbers);
  const operator = readText(reader, { field: 'operator', name: 'Operator', maxLength: OPERATOR_MAX_LENGTH });
  const remarks = readText(reader, {
    field: 'remarks',
    name: 'Remarks',
    maxLength: REMARKS_MAX_LENGTH,
    isMultiline: true,
  });
  const cornea = areCornea(numbers) ? readCornea(numbers, reader.refuse) : null;
  if (problems.length > 0 || method === null || cornea === null) return { problems };
  return { values: valuesOf({ measuredAt, method, device, acdFrom, operator, remarks }, numbers, cornea) };
}

/** Written out field by field: the order is that of the contract, and the content digest depends on it. */
function valuesOf(
  words: Pick<MeasurementValues, 'measuredAt' | 'method' | 'device' | 'acdFrom' | 'operator' | 'remarks'>,
  numbers: Numbers,
  cornea: Cornea,
): MeasurementValues {
  // Nothing was refused, so nothing is undefined any more, and the axial length is there.
  const read = numbers as Record<NumberField, number | null> & { axialLengthMm: number };
  return {
    measuredAt: words.measuredAt,
    method: words.method,
    device: words.device,
    axialLengthMm: read.axialLengthMm,
    axialLengthSdMm: read.axialLengthSdMm,
    flatRadiusMm: cornea.flatRadiusMm,
    steepRadiusMm: cornea.steepRadiusMm,
    flatKD: cornea.flatKD,
    steepKD: cornea.steepKD,
    keratometricIndex: cornea.keratometricIndex,
    flatAxisDeg: cornea.flatAxisDeg,
    steepAxisDeg: cornea.steepAxisDeg,
    acdMm: read.acdMm,
    acdFrom: words.acdFrom,
    lensThicknessMm: read.lensThicknessMm,
    cornealThicknessUm: read.cornealThicknessUm,
    whiteToWhiteMm: read.whiteToWhiteMm,
    pupilMm: read.pupilMm,
    operator: words.operator,
    remarks: words.remarks,
  };
}

const measurementTextInput = z.object(
  Object.fromEntries(MEASUREMENT_TEXT_FIELDS.map((field) => [field, z.string().optional()])) as Record<
    MeasurementTextField,
    z.ZodOptional<z.ZodString>
  >,
);

const entryOf = <T extends z.ZodType>(text: T) =>
  z
    .object({
      text,
      /** The measurement that this one takes the place of. */
      supersedesId: idSchema.nullable(),
      reason: textOf(500, 'Reason'),
    })
    .refine((entry) => entry.supersedesId === null || entry.reason.length >= 5, {
      path: ['reason'],
      message: 'Say in a few words why the measurement is superseded',
    });

/** Text in, values out, for the form. The server reads again, knowing the birth date. */
export const measurementTextSchema = measurementTextInput.transform((text, context): MeasurementValues => {
  const reading = readMeasurement(text, { today: localDateOf(new Date()) });
  if ('values' in reading) return reading.values;
  for (const { field, message } of reading.problems)
    context.addIssue({ code: 'custom', path: [field], message });
  return z.NEVER;
});
export const measurementEntrySchema = entryOf(measurementTextSchema);
/** As it travels: the text itself. */
export const measurementEntryRequestSchema = entryOf(measurementTextInput);
export type MeasurementEntryRequest = z.infer<typeof measurementEntryRequestSchema>;

type NumberField = Exclude<
  MeasurementTextField,
  'measuredAt' | 'method' | 'device' | 'acdFrom' | 'operator' | 'remarks'
>;
/** Null: not given. Undefined: given and refused, so that no later rule complains about it again. */
type Numbers = Record<NumberField, number | null | undefined>;

interface Reader {
  text: MeasurementText;
  trimmed: (field: MeasurementTextField) => string;
  refuse: (field: MeasurementTextField, message: string) => void;
}

function readDate({ trimmed, refuse }: Reader, { today, birthDate }: MeasurementReadingOptions): string {
  const date = trimmed('measuredAt');
  if (date === '') refuse('measuredAt', 'Date of the measurement is missing');
  else if (!isCalendarDate(date))
    refuse('measuredAt', `${quoted(date)} is not a date of the calendar: write it as YYYY-MM-DD`);
  else if (date > today) refuse('measuredAt', `${date} lies in the future`);
  else if (birthDate !== undefined && date < birthDate)
    refuse('measuredAt', `${date} lies before the birth on ${birthDate}`);
  return date;
}

function readMethod(reader: Reader): MeasurementValues['method'] | null {
  if (reader.trimmed('method') === '') reader.refuse('method', `Method is missing: write ${listed(METHODS)}`);
  return readChoice(reader, { field: 'method', name: 'Method', choices: METHODS });
}

interface ChoiceField<T extends string> {
  field: MeasurementTextField;
  name: string;
  choices: readonly T[];
}
function readChoice<T extends string>(
  { trimmed, refuse }: Reader,
  { field, name, choices }: ChoiceField<T>,
): T | null {
  const text = trimmed(field);
  if (text === '') return null;
  const choice = choices.find((candidate) => candidate === text || candidate === text.toLowerCase());
  if (choice === undefined) refuse(field, `${name} ${quoted(text)} is unknown: write ${listed(choices)}`);
  return choice ?? null;
}

function readText(
  { trimmed, refuse }: Reader,
  { field, ...rule }: { field: MeasurementTextField; name: string; maxLength: number; isMultiline?: boolean },
): string {
  const text = trimmed(field);
  if (text === '') return text;
  const value = rule.isMultiline ? text.replace(/\r\n?/g, '\n') : text;
  const problem = textProblem(value, rule);
  if (problem !== undefined) refuse(field, problem);
  return value;
}

function readNumbers(reader: Reader): Numbers {
  const numbers = {} as Numbers;
  for (const field of MEASUREMENT_FIELDS) numbers[field.field as NumberField] = readNumber(reader, field);
  if (numbers.axialLengthMm === null) reader.refuse('axialLengthMm', 'Axial length is missing');
  const { acdMm, lensThicknessMm } = numbers;
  if (acdMm && lensThicknessMm && acdMm + lensThicknessMm > ACD_AND_LENS_MAX_MM) {
    reader.refuse(
      'lensThicknessMm',
      `Anterior chamber depth and lens thickness together exceed ${ACD_AND_LENS_MAX_MM} mm: one of them is mistyped`,
    );
  }
  return numbers;
}

function readNumber({ text, refuse }: Reader, field: MeasurementField): number | null | undefined {
  const given = text[field.field];
  if (given === undefined || given === '') return null;
  const value = parseDecimal(given);
  if (value === undefined) return null;
  if (value === null) {
    refuse(field.field, `${field.label} ${quoted(given.trim())} is not a number`);
    return undefined;
  }
  if (value >= field.min && value <= field.max) return toNineDecimals(value);
  const hint = unitHint(field, value);
  const limits = `${field.label} must lie between ${field.min} and ${field.max}${field.unit && ` ${field.unit}`}`;
  refuse(field.field, hint === undefined ? limits : `${limits}; ${value} ${hint}`);
  return undefined;
}

/** Depth from the epithelium and depth from the endothelium differ by the cornea: one is not the other. */
function readAcdFrom(reader: Reader, { acdMm }: Numbers): MeasurementValues['acdFrom'] {
  const from = readChoice(reader, { field: 'acdFrom', name: 'ACD reference', choices: ACD_FROM });
  if (acdMm == null) return null;
  if (from === null && reader.trimmed('acdFrom') === '') {
    reader.refuse('acdFrom', `Say where the anterior chamber depth was measured from: ${listed(ACD_FROM)}`);
  }
  return from;
}

function areCornea(numbers: Numbers): numbers is Numbers & GivenCornea {
  return CORNEA_FIELDS.every((field) => numbers[field] !== undefined);
}
const CORNEA_FIELDS: readonly CorneaField[] = [
  'flatKD',
  'steepKD',
  'keratometricIndex',
  'flatRadiusMm',
  'steepRadiusMm',
  'flatAxisDeg',
  'steepAxisDeg',
];

function listed(choices: readonly string[]): string {
  return `${choices.slice(0, -1).join(', ')} or ${choices.at(-1)}`;
}
