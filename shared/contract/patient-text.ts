/** The reading of a patient's identity given as text in a file: the rules of `patientInputSchema` in plain code. */
import { isCalendarDate } from './calendar';
import { quoted, textProblem } from './free-text';
import { SIDES, type Side } from './common';
import {
  isPlausibleBirthDate,
  NAME_MAX_LENGTH,
  RECORD_NUMBER_MAX_LENGTH,
  SEXES,
  type PatientInput,
} from './patient';

export type PatientText = Record<keyof PatientInput, string>;
export interface PatientProblem {
  field: keyof PatientInput;
  message: string;
}
export type PatientReading = { values: PatientInput } | { problems: PatientProblem[] };

const LINES = [
  { field: 'recordNumber', name: 'Record number', maxLength: RECORD_NUMBER_MAX_LENGTH },
  { field: 'familyName', name: 'Family name', maxLength: NAME_MAX_LENGTH },
  { field: 'givenName', name: 'Given name', maxLength: NAME_MAX_LENGTH },
] as const;

export function readPatient(text: PatientText, { today }: { today: string }): PatientReading {
  const problems: PatientProblem[] = [];
  for (const { field, ...rule } of LINES) {
    const line = text[field].trim();
    const message = line === '' ? `${rule.name} is missing` : textProblem(line, rule);
    if (message !== undefined) problems.push({ field, message });
  }
  const birthDate = text.birthDate.trim();
  const birthProblem = birthDateProblem(birthDate, today);
  if (birthProblem !== undefined) problems.push({ field: 'birthDate', message: birthProblem });
  const sex = SEXES.find((candidate) => candidate === text.sex.trim().toLowerCase());
  if (sex === undefined) problems.push({ field: 'sex', message: choiceProblem('Sex', text.sex, SEXES) });
  if (problems.length > 0 || sex === undefined) return { problems };
  return {
    values: {
      recordNumber: text.recordNumber.trim(),
      familyName: text.familyName.trim(),
      givenName: text.givenName.trim(),
      birthDate,
      sex,
    },
  };
}

/** The side as written out in words; null with a message when it is anything else. Never guessed. */
export function readSide(text: string): { side: Side } | { message: string } {
  const side = SIDES.find((candidate) => candidate === text.trim().toLowerCase());
  return side === undefined ? { message: choiceProblem('Side', text, SIDES) } : { side };
}

/** As lists and sheets write a patient: family name first. */
export function formatPatientName({
  familyName,
  givenName,
}: Pick<PatientInput, 'familyName' | 'givenName'>): string {
  return [familyName, givenName].filter((name) => name !== '').join(', ');
}

function birthDateProblem(date: string, today: string): string | undefined {
  if (date === '') return 'Birth date is missing';
  if (!isCalendarDate(date)) return `${quoted(date)} is not a date of the calendar: write it as YYYY-MM-DD`;
  return isPlausibleBirthDate(date, today) ? undefined : 'Birth date must lie between 1900 and today';
}

function choiceProblem(name: string, text: string, choices: readonly string[]): string {
  const list = `write ${choices.slice(0, -1).join(', ')} or ${choices.at(-1)}`;
  return text.trim() === ''
    ? `${name} is missing: ${list}`
    : `${name} ${quoted(text.trim())} is unknown: ${list}`;
}
