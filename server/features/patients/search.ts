/** Finding a patient by what a person at the desk types: parts of names, record number, birth date. */
import { isCalendarDate, type PatientInput } from '@/shared/contract';

/** Letters that stand for themselves, not for a letter with an accent. */
const LETTERS: Readonly<Record<string, string>> = {
  ß: 'ss',
  æ: 'ae',
  œ: 'oe',
  ø: 'o',
  đ: 'd',
  ð: 'd',
  ł: 'l',
  þ: 'th',
  ı: 'i',
};
const NOT_ASCII = /[^\u0000-\u007f]/;
const GERMAN_DATE = /^(\d{1,2})\.(\d{1,2})\.(\d{4})$/;

/** Lower case, without accents, one space between words. */
export function foldText(text: string): string {
  const folded = text.toLowerCase().replace(/\s+/g, ' ').trim();
  if (!NOT_ASCII.test(folded)) return folded;
  return folded
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .replace(/[ßæœøđðłþı]/g, (letter) => LETTERS[letter] ?? letter);
}

export function searchKeyOf({ familyName, givenName, recordNumber }: PatientInput): string {
  return foldText(`${familyName} ${givenName} ${recordNumber}`);
}

/** A word must stand somewhere in the search key; where it is also a date, the birth date may match instead. */
export interface SearchTerm {
  word: string;
  birthDate: string | undefined;
}

export function searchTerms(search: string | undefined): SearchTerm[] {
  const words = foldText(search ?? '').split(' ');
  return words.filter(Boolean).map((word) => ({ word, birthDate: dateIn(word) }));
}

/** The same name, whatever its accents and capitals, and the same birth date. */
export function identityKeyOf({ familyName, givenName, birthDate }: PatientInput): string {
  return `${foldText(familyName)}|${foldText(givenName)}|${birthDate}`;
}

function dateIn(word: string): string | undefined {
  const [, day, month, year] = GERMAN_DATE.exec(word) ?? [];
  const iso = year ? `${year}-${month?.padStart(2, '0')}-${day?.padStart(2, '0')}` : word;
  return isCalendarDate(iso) ? iso : undefined;
}
