/** The reading of a patient in a file says the same as the schema of the form. */
import * as fc from 'fast-check';
import { patientInputSchema, readPatient, readSide, type PatientText } from '@/shared/contract';

const today = new Date().toISOString().slice(0, 10);
const GOOD: PatientText = {
  recordNumber: ' R-0001 ',
  familyName: "O'Invented",
  givenName: 'Ana María',
  birthDate: '1950-02-28',
  sex: 'Female',
};

const messagesOf = (change: Partial<PatientText>): string[] => {
  const reading = readPatient({ ...GOOD, ...change }, { today });
  return 'problems' in reading ? reading.problems.map(({ field, message }) => `${field}: ${message}`) : [];
};

it('reads a patient, trimmed', () => {
  expect(readPatient(GOOD, { today })).toEqual({
    values: {
      recordNumber: 'R-0001',
      familyName: "O'Invented",
      givenName: 'Ana María',
      birthDate: '1950-02-28',
      sex: 'female',
    },
  });
});

it.each<[Partial<PatientText>, string]>([
  [{ recordNumber: ' ' }, 'recordNumber: Record number is missing'],
  [{ familyName: 'x'.repeat(10_000) }, 'familyName: Family name is longer than 100 characters'],
  [{ givenName: 'a\u0000b' }, 'givenName: Given name contains control characters'],
  [{ birthDate: '' }, 'birthDate: Birth date is missing'],
  [
    { birthDate: '2026-02-30' },
    'birthDate: "2026-02-30" is not a date of the calendar: write it as YYYY-MM-DD',
  ],
  [{ birthDate: '1899-12-31' }, 'birthDate: Birth date must lie between 1900 and today'],
  [{ birthDate: '2999-01-01' }, 'birthDate: Birth date must lie between 1900 and today'],
  [{ sex: 'f' }, 'sex: Sex "f" is unknown: write female, male, other or unknown'],
  [{ sex: '' }, 'sex: Sex is missing: write female, male, other or unknown'],
])('refuses %j', (change, message) => {
  expect(messagesOf(change)).toEqual([message]);
});

it('never guesses a side', () => {
  expect(readSide(' Right')).toEqual({ side: 'right' });
  expect(readSide('OD')).toEqual({ message: 'Side "OD" is unknown: write right or left' });
  expect(readSide('')).toEqual({ message: 'Side is missing: write right or left' });
});

it('accepts and refuses the same as the schema', () => {
  const line = fc.oneof(
    fc.string({ maxLength: 120 }),
    fc.constantFrom('', ' ', 'a\tb', 'Ä'.repeat(100), '=1+1'),
  );
  const date = fc.oneof(
    fc.constantFrom('1899-12-31', '1900-01-01', '2023-02-29', '2024-02-29', '', '1.2.1950'),
    fc
      .date({ min: new Date('1890-01-01'), max: new Date('2030-01-01'), noInvalidDate: true })
      .map((d) => d.toISOString().slice(0, 10)),
  );
  const sex = fc.constantFrom('female', 'male', 'other', 'unknown', 'f', '');

  fc.assert(
    fc.property(line, line, date, sex, (recordNumber, name, birthDate, sexText) => {
      const text = { recordNumber, familyName: name, givenName: 'x', birthDate, sex: sexText };
      const reading = readPatient(text, { today });
      const parsed = patientInputSchema.safeParse(text);

      expect('values' in reading ? reading.values : undefined).toEqual(parsed.data);
    }),
    { numRuns: 500 },
  );
});
