/**
 * Bytes of an uploaded file as text. Only UTF-8 is taken: a guessed encoding would change names silently.
 */
import { isUtf8 } from 'node:buffer';

export type DecodedText = { text: string; hasByteOrderMark: boolean } | { problem: FileProblem };

/** Why a file as a whole cannot be read. */
export interface FileProblem {
  code: string;
  message: string;
}

const BYTE_ORDER_MARK = Buffer.from([0xef, 0xbb, 0xbf]);
const LINE_FEED = 0x0a;

/** Bytes that other kinds of files begin with. */
const OTHER_KINDS: readonly { start: Buffer; message: string }[] = [
  {
    start: Buffer.from([0xff, 0xfe]),
    message: 'The file is UTF-16: save it as CSV in UTF-8',
  },
  {
    start: Buffer.from([0xfe, 0xff]),
    message: 'The file is UTF-16: save it as CSV in UTF-8',
  },
  {
    start: Buffer.from('PK\u0003\u0004', 'latin1'),
    message: 'This is a spreadsheet or an archive, not a CSV file: export the sheet as CSV in UTF-8',
  },
  {
    start: Buffer.from([0xd0, 0xcf, 0x11, 0xe0]),
    message: 'This is a spreadsheet, not a CSV file: export the sheet as CSV in UTF-8',
  },
  { start: Buffer.from('%PDF', 'latin1'), message: 'This is a PDF, not a CSV file' },
];

/** The text with line feeds as its only line ends, or why there is none. */
export function decodeText(bytes: Buffer): DecodedText {
  const problem = problemOf(bytes);
  if (problem) return { problem };
  const hasByteOrderMark = bytes.subarray(0, BYTE_ORDER_MARK.length).equals(BYTE_ORDER_MARK);
  const text = bytes.toString('utf8', hasByteOrderMark ? BYTE_ORDER_MARK.length : 0);
  return { text: withLineFeeds(text), hasByteOrderMark };
}

function problemOf(bytes: Buffer): FileProblem | undefined {
  if (bytes.length === 0) return { code: 'empty', message: 'The file is empty' };
  const other = OTHER_KINDS.find(({ start }) => bytes.subarray(0, start.length).equals(start));
  if (other) return { code: 'not-text', message: other.message };
  const nul = bytes.indexOf(0);
  if (nul !== -1) {
    return {
      code: 'not-text',
      message: `The file is not text: NUL byte in line ${lineOfByte(bytes, nul)}`,
    };
  }
  if (isUtf8(bytes)) return undefined;
  return {
    code: 'not-utf8',
    message: `The file is not UTF-8: line ${firstBadLine(bytes)} cannot be read. Save it as CSV in UTF-8`,
  };
}

function lineOfByte(bytes: Buffer, position: number): number {
  let line = 1;
  for (let at = bytes.indexOf(LINE_FEED); at !== -1 && at < position; at = bytes.indexOf(LINE_FEED, at + 1))
    line += 1;
  return line;
}

/** A line feed never stands inside a character of UTF-8, so lines can be judged one by one. */
function firstBadLine(bytes: Buffer): number {
  let line = 1;
  for (let start = 0; start < bytes.length; line += 1) {
    const feed = bytes.indexOf(LINE_FEED, start);
    const end = feed === -1 ? bytes.length : feed + 1;
    if (!isUtf8(bytes.subarray(start, end))) return line;
    start = end;
  }
  return line;
}

function withLineFeeds(text: string): string {
  return text.includes('\r') ? text.replace(/\r\n?/g, '\n') : text;
}
