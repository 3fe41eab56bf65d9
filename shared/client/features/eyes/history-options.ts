/** The answers of the eye's history in words. */
import {
  CORNEAL_SURGERY_ANSWERS,
  CORNEAL_SURGERY_KINDS,
  LENS_STATUSES,
  VITREOUS_STATUSES,
} from '@/shared/contract';

const words = <T extends string>(values: readonly T[], names: Record<T, string>) =>
  values.map((value) => ({ value, label: names[value] }));

export const SURGERY_OPTIONS = words(CORNEAL_SURGERY_ANSWERS, { no: 'No', yes: 'Yes', unknown: 'Not known' });
export const KIND_OPTIONS = words(CORNEAL_SURGERY_KINDS, {
  'myopic-laser': 'Laser for nearsightedness',
  'hyperopic-laser': 'Laser for farsightedness',
  'radial-keratotomy': 'Radial keratotomy',
  keratoplasty: 'Corneal graft',
  other: 'Other',
});
export const LENS_OPTIONS = words(LENS_STATUSES, {
  phakic: 'Natural lens',
  pseudophakic: 'Artificial lens',
  aphakic: 'No lens',
  'phakic-lens': 'Natural and added lens',
});
export const VITREOUS_OPTIONS = words(VITREOUS_STATUSES, {
  vitreous: 'Vitreous',
  'silicone-oil': 'Silicone oil',
  gas: 'Gas',
  unknown: 'Not known',
});

/** `—` with the word for "nobody has answered", which is not "not known". */
export const UNANSWERED = 'Nobody has answered yet';
export function wordFor<T extends string>(
  options: readonly { value: T; label: string }[],
  value: T | null,
): string {
  return options.find((option) => option.value === value)?.label ?? UNANSWERED;
}
