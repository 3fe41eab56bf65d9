/**
 * How an eye of the demonstration is written down, and how it becomes a row of the biometry template.
 * All people are invented.
 */
import type { TemplateColumn } from '@/shared/contract';

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
  method?: 'optical' | 'immersion' | 'contact';
  daysAgo?: number;
  remarks?: string;
}

const DEVICES = {
  optical: 'optical biometer (demo)',
  immersion: 'A-scan, shell (demo)',
  contact: 'A-scan, probe (demo)',
};
const SD_MM = { optical: '0.02', immersion: '0.04', contact: '0.11' };
const DAY_MS = 86_400_000;

/** ISO date `days` before `today`. */
export function daysBefore(today: string, days: number): string {
  return new Date(Date.parse(`${today}T00:00:00Z`) - days * DAY_MS).toISOString().slice(0, 10);
}

const text = (value: number | undefined, decimals: number): string => value?.toFixed(decimals) ?? '';

export type TemplateRow = Record<TemplateColumn, string>;

export function templateRow(
  person: DemoPerson,
  side: 'right' | 'left',
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
    measured_at: daysBefore(today, eye.daysAgo ?? 12),
    method,
    device: DEVICES[method],
    axial_length_mm: text(eye.axialLengthMm, 2),
    axial_length_sd_mm: SD_MM[method],
    flat_k_d: text(eye.flatKD, 2),
    flat_axis_deg: String(flatAxisDeg),
    steep_k_d: text(eye.steepKD, 2),
    steep_axis_deg: String(eye.steepAxisDeg),
    keratometric_index: '1.3375',
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
