/** What a number outside its limits most likely was meant to be. A hint for people, never a correction. */
import type { MeasurementField } from './measurement';

interface Mistake {
  looksLike: (value: number) => string;
  /** The number as it would read in the field's unit. */
  meant: (value: number) => number;
}

const dioptresAsMm: Mistake = {
  looksLike: () => 'looks like a power in dioptres, this field takes a radius in mm',
  meant: (value) => 337.5 / value,
};
const mmAsDioptres: Mistake = {
  looksLike: () => 'looks like a radius in mm, this field takes a power in dioptres',
  meant: (value) => 337.5 / value,
};
const centimetres: Mistake = { looksLike: () => 'looks like cm', meant: (value) => value * 10 };
const micrometres: Mistake = { looksLike: () => 'looks like µm', meant: (value) => value / 1000 };
const millimetres: Mistake = { looksLike: () => 'looks like mm', meant: (value) => value * 1000 };

/** The first that brings the number into its limits is shown. */
const MISTAKES_BY_UNIT: Record<string, readonly Mistake[]> = {
  D: [mmAsDioptres],
  mm: [micrometres, centimetres],
  µm: [millimetres],
};
const MISTAKES_BY_FIELD: Partial<Record<MeasurementField['field'], readonly Mistake[]>> = {
  flatRadiusMm: [dioptresAsMm, micrometres],
  steepRadiusMm: [dioptresAsMm, micrometres],
};

/** `looks like 23.50 mm without its decimal mark`, or nothing when no common mistake explains the number. */
export function unitHint(field: MeasurementField, value: number): string | undefined {
  const mistakes = MISTAKES_BY_FIELD[field.field] ?? MISTAKES_BY_UNIT[field.unit] ?? [];
  const mistake = mistakes.find(({ meant }) => isWithin(field, meant(value)));
  return mistake?.looksLike(value) ?? lostDecimalMark(field, value);
}

function lostDecimalMark(field: MeasurementField, value: number): string | undefined {
  if (field.unit === '°' || !Number.isInteger(value)) return undefined;
  const digits = field.unit === '' ? [10_000, 1000] : [10, 100, 1000];
  const divisor = digits.find((power) => isWithin(field, value / power));
  if (divisor === undefined) return undefined;
  const meant = (value / divisor).toFixed(field.unit === '' ? 4 : 2);
  return `looks like ${meant}${field.unit && ` ${field.unit}`} without its decimal mark`;
}

function isWithin({ min, max }: MeasurementField, value: number): boolean {
  return value >= min && value <= max;
}
