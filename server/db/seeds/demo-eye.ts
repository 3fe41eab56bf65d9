/**
 * How an eye of the demonstration is written down, and how it becomes a row of the biometry template.
 * All people are invented.
 */
import {
  MEASUREMENT_TEXT_COLUMNS,
  MEASUREMENT_TEXT_FIELDS,
  type Method,
  type MeasurementText,
  type Side,
  type TemplateColumn,
} from '@/shared/contract';
import { clinicDay } from './demo-days';

export interface DemoPerson {
  record: string;
  family: string;
  given: string;
  born: string;
  sex: 'female' | 'male';
}

export interface DemoEye {
  axialLengthMm: number;
  flatKD: number;
  steepKD: number;
  steepAxisDeg: number;
  acdMm?: number;
  acdFrom?: 'epithelium' | 'endothelium';
  lensThicknessMm?: number;
  cornealThicknessUm?: number;
  whiteToWhiteMm?: number;
  method?: Method;
  /** Before the day on which the demonstration began. */
  daysAgo?: number;
  remarks?: string;
}

export const USUAL_DAYS_AGO = 12;

const DEVICES: Record<Method, string> = {
  optical: 'Optical biometer (demo)',
  immersion: 'A-scan with shell (demo)',
  contact: 'A-scan with probe (demo)',
};
const KERATOMETRIC_INDEX = 1.3375;

const text = (value: number | undefined, decimals: number): string => value?.toFixed(decimals) ?? '';

export type TemplateRow = Record<TemplateColumn, string>;

export function templateRow(
  person: DemoPerson,
  side: Side,
  { eye, today }: { eye: DemoEye; today: string },
): TemplateRow {
  const method = eye.method ?? 'optical';
  const flatAxisDeg = eye.steepAxisDeg > 90 ? eye.steepAxisDeg - 90 : eye.steepAxisDeg + 90;
  return {
    record_number: person.record,
    family_name: person.family,
    given_name: person.given,
    birth_date: person.born,
    sex: person.sex,
    side,
    measured_at: clinicDay(today, eye.daysAgo ?? USUAL_DAYS_AGO),
    method,
    device: DEVICES[method],
    axial_length_mm: text(eye.axialLengthMm, 2),
    axial_length_sd_mm: text(axialLengthSdMm(method, eye.axialLengthMm), 2),
    flat_k_d: text(eye.flatKD, 2),
    flat_axis_deg: text(flatAxisDeg, 0),
    steep_k_d: text(eye.steepKD, 2),
    steep_axis_deg: text(eye.steepAxisDeg, 0),
    keratometric_index: text(KERATOMETRIC_INDEX, 4),
    flat_radius_mm: '',
    steep_radius_mm: '',
    acd_mm: text(eye.acdMm, 2),
    acd_from: eye.acdMm === undefined ? '' : (eye.acdFrom ?? 'epithelium'),
    lens_thickness_mm: text(eye.lensThicknessMm, 2),
    corneal_thickness_um: text(eye.cornealThicknessUm, 0),
    white_to_white_mm: text(eye.whiteToWhiteMm, 2),
    pupil_mm: '',
    operator: 'Tilda Marsh (demo)',
    remarks: eye.remarks ?? '',
  };
}

/** The same row with radii in mm in the place of powers: the template takes either. */
export function withRadii(row: TemplateRow): TemplateRow {
  const radiusMm = (powerD: string): string => text(((KERATOMETRIC_INDEX - 1) * 1000) / Number(powerD), 2);
  return {
    ...row,
    flat_radius_mm: radiusMm(row.flat_k_d),
    steep_radius_mm: radiusMm(row.steep_k_d),
    flat_k_d: '',
    steep_k_d: '',
    keratometric_index: '',
  };
}

/** The row's measurement as somebody would type it into the form. */
export function typedMeasurement(row: TemplateRow): MeasurementText {
  return Object.fromEntries(
    MEASUREMENT_TEXT_FIELDS.map((field) => [field, row[MEASUREMENT_TEXT_COLUMNS[field]]]),
  );
}

/** Good readings scatter by 0.01 to 0.03 mm optically, more by ultrasound, most by contact. */
function axialLengthSdMm(method: Method, axialLengthMm: number): number {
  const hundredths = Math.round(axialLengthMm * 100) % 3;
  return { optical: 0.01, immersion: 0.05, contact: 0.11 }[method] + hundredths / 100;
}
