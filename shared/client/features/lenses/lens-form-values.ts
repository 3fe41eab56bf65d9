/**
 * The lens form as text, and its way to and from a lens. Numbers stay as typed until they are read by the
 * contract's one decimal parser.
 */
import {
  CONSTANT_KEYS,
  CONSTANT_ORIGINS,
  FORMULA_IDS,
  FORMULA_NAMES,
  LENS_DESIGNS,
  LENS_KINDS,
  lensInputSchema,
  parseDecimal,
} from '@/shared/contract';
import type { ConstantOrigin, Lens, LensConstant, LensDesign, LensInput, LensKind } from '@/shared/contract';

type FormulaId = LensConstant['formula'];

export interface RangeText {
  fromD: string;
  toD: string;
  stepD: string;
}
export interface ConstantText {
  formula: FormulaId;
  origin: ConstantOrigin;
  /** One text per key of CONSTANT_KEYS; all empty: no constants of this formula and origin. */
  values: string[];
  source: string;
  dated: string;
}
export interface LensFormValues {
  name: string;
  kind: LensKind;
  design: LensDesign;
  ranges: RangeText[];
  cylinders: string;
  constants: ConstantText[];
  remarks: string;
  isRetired: boolean;
}

export const CONSTANT_LABELS: Record<string, string> = {
  aConstant: 'A-constant',
  surgeonFactorMm: 'Surgeon factor',
  pAcdMm: 'pACD',
  a0Mm: 'a0',
  a1: 'a1',
  a2: 'a2',
};

export function emptyLens(): LensFormValues {
  return {
    name: '',
    kind: LENS_KINDS[0],
    design: LENS_DESIGNS[0],
    ranges: [{ fromD: '', toD: '', stepD: '0.5' }],
    cylinders: '',
    constants: constantGrid([]),
    remarks: '',
    isRetired: false,
  };
}

export function lensToForm(lens: Lens): LensFormValues {
  return {
    name: lens.name,
    kind: lens.kind,
    design: lens.design,
    ranges: lens.powerRanges.map((range) => ({
      fromD: String(range.fromD),
      toD: String(range.toD),
      stepD: String(range.stepD),
    })),
    cylinders: lens.cylinderStepsD.join('  '),
    constants: constantGrid(lens.constants),
    remarks: lens.remarks,
    isRetired: lens.isRetired,
  };
}

/** One line for each formula and origin, filled where the lens has constants. */
function constantGrid(constants: readonly LensConstant[]): ConstantText[] {
  return CONSTANT_ORIGINS.flatMap((origin) =>
    FORMULA_IDS.map((formula) => {
      const known = constants.find((constant) => constant.formula === formula && constant.origin === origin);
      const values = known ? (known.values as Record<string, number>) : {};
      return {
        formula,
        origin,
        values: CONSTANT_KEYS[formula].map((key) => (values[key] === undefined ? '' : String(values[key]))),
        source: known?.source ?? '',
        dated: known?.dated ?? '',
      };
    }),
  );
}

export type LensReading = { input: LensInput } | { messages: string[] };

/** Reads the form; every message names its place. */
export function readLensForm(form: LensFormValues): LensReading {
  const messages: string[] = [];
  const number = (text: string, place: string): number => {
    const value = parseDecimal(text);
    if (typeof value === 'number') return value;
    messages.push(value === undefined ? `${place} is missing` : `${place}: "${text}" is not a number`);
    return Number.NaN;
  };
  const powerRanges = form.ranges.map((range, index) => ({
    fromD: number(range.fromD, `Range ${index + 1}, from`),
    toD: number(range.toD, `Range ${index + 1}, to`),
    stepD: number(range.stepD, `Range ${index + 1}, step`),
  }));
  const cylinderStepsD = form.cylinders
    .split(/[\s;]+/)
    .filter(Boolean)
    .map((text) => number(text, 'Cylinder steps'));
  const constants = form.constants.filter(isFilled).map((line) => {
    const place = `${FORMULA_NAMES[line.formula]}, ${line.origin}`;
    const entries = CONSTANT_KEYS[line.formula].map((key, index) => [
      key,
      number(line.values[index] ?? '', `${place}, ${CONSTANT_LABELS[key]}`),
    ]);
    return {
      formula: line.formula,
      origin: line.origin,
      values: Object.fromEntries(entries),
      source: line.source,
      dated: line.dated,
    };
  });
  if (messages.length > 0) return { messages };
  const parsed = lensInputSchema.safeParse({
    ...form,
    powerRanges,
    cylinderStepsD,
    isToric: cylinderStepsD.length > 0,
    constants,
  });
  if (parsed.success) return { input: parsed.data };
  return {
    messages: parsed.error.issues.map((issue) => `${placeOf(issue.path, constants)}${issue.message}`),
  };
}

const isFilled = (line: ConstantText): boolean => line.values.some((text) => text.trim() !== '');

function placeOf(
  path: readonly PropertyKey[],
  constants: readonly { formula: FormulaId; origin: ConstantOrigin }[],
): string {
  const line = path[0] === 'constants' ? constants[Number(path[1])] : undefined;
  if (line) return `${FORMULA_NAMES[line.formula]}, ${line.origin}: `;
  return path[0] === 'powerRanges' ? `Range ${Number(path[1]) + 1}: ` : '';
}
