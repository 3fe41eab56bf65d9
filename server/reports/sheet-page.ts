/** A page to write on: cursor, fonts, tables; turns the page when it is full. Black on white throughout. */
import PDFDocument from 'pdfkit';
import { SHEET_FONTS, type SheetFont } from './sheet-fonts';

export type Paper = 'a4' | 'letter';
export const MARGIN = 40;
const INK = '#000000';
const FOOT = 46;

export interface TextStyle {
  font?: SheetFont;
  size?: number;
  x?: number;
  width?: number;
  align?: 'left' | 'right' | 'center';
  /** Stay on the line: the cursor does not move down. */
  isInline?: boolean;
}

export interface SheetColumn {
  title: string;
  /** Share of the width. */
  share: number;
  isNumber?: boolean;
}

export class SheetPage {
  readonly document: PDFKit.PDFDocument;
  y = MARGIN;

  constructor(paper: Paper, info: { title: string; at: Date }) {
    this.document = new PDFDocument({
      size: paper === 'a4' ? 'A4' : 'LETTER',
      margin: 0,
      bufferPages: true,
      lang: 'en',
      displayTitle: true,
      // The moment of signing, not of printing: the same plan gives the same bytes.
      info: {
        Title: info.title,
        Creator: 'Landfall',
        Producer: 'Landfall',
        CreationDate: info.at,
        ModDate: info.at,
      },
    });
    for (const [name, path] of Object.entries(SHEET_FONTS)) this.document.registerFont(name, path);
    this.document.fillColor(INK).strokeColor(INK);
  }

  get width(): number {
    return this.document.page.width - 2 * MARGIN;
  }

  text(
    words: string,
    { font = 'words', size = 10, x = MARGIN, width, align = 'left', isInline }: TextStyle = {},
  ): void {
    const given = width ?? MARGIN + this.width - x;
    this.document.font(font).fontSize(size);
    const height = this.document.heightOfString(words, { width: given });
    if (!isInline) this.makeRoom(height);
    this.document.text(words, x, this.y, { width: given, align, lineBreak: true });
    if (!isInline) this.y += height;
  }

  gap(points: number): void {
    this.y += points;
  }

  rule(thickness = 0.75): void {
    this.document
      .moveTo(MARGIN, this.y)
      .lineTo(MARGIN + this.width, this.y)
      .lineWidth(thickness)
      .stroke();
    this.y += 4;
  }

  heading(words: string): void {
    this.makeRoom(40);
    this.gap(8);
    this.text(words, { font: 'wordsBold', size: 11 });
    this.rule();
  }

  table(columns: readonly SheetColumn[], rows: readonly (readonly string[])[]): void {
    const shares = columns.reduce((sum, { share }) => sum + share, 0);
    const cells = columns.map((column, index) => {
      const before = columns.slice(0, index).reduce((sum, { share }) => sum + share, 0);
      return {
        x: MARGIN + (this.width * before) / shares,
        width: (this.width * column.share) / shares - 6,
        column,
      };
    });
    this.row(
      cells.map(({ x, width, column }) => ({
        words: column.title,
        x,
        width,
        font: 'wordsBold' as const,
        align: alignOf(column),
      })),
      8,
    );
    for (const row of rows) {
      this.row(
        cells.map(({ x, width, column }, index) => ({
          words: row[index] ?? '',
          x,
          width,
          font: fontOf(column),
          align: alignOf(column),
        })),
        9,
      );
    }
  }

  private row(
    cells: readonly { words: string; x: number; width: number; font: SheetFont; align: 'left' | 'right' }[],
    size: number,
  ): void {
    const heights = cells.map(({ words, width, font }) =>
      this.document.font(font).fontSize(size).heightOfString(words, { width }),
    );
    const height = Math.max(...heights);
    this.makeRoom(height + 2);
    for (const { words, ...style } of cells) this.text(words, { ...style, size, isInline: true });
    this.y += height + 2;
  }

  private makeRoom(height: number): void {
    if (this.y + height <= this.document.page.height - MARGIN - FOOT) return;
    this.document.addPage();
    this.document.fillColor(INK).strokeColor(INK);
    this.y = MARGIN;
  }

  /** The same lines at the foot of every page; gives the finished bytes. */
  finish(footOf: (page: number, pages: number) => string[]): Promise<Buffer> {
    const { start, count } = this.document.bufferedPageRange();
    for (let index = start; index < start + count; index += 1) {
      this.document.switchToPage(index);
      this.y = this.document.page.height - MARGIN - FOOT + 8;
      this.rule(0.5);
      for (const line of footOf(index + 1, count)) {
        this.text(line, { size: 7, isInline: true });
        this.y += 10;
      }
    }
    return bytesOf(this.document);
  }
}

const alignOf = ({ isNumber }: SheetColumn): 'left' | 'right' => (isNumber ? 'right' : 'left');
const fontOf = ({ isNumber }: SheetColumn): SheetFont => (isNumber ? 'numbers' : 'words');

function bytesOf(document: PDFKit.PDFDocument): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const parts: Buffer[] = [];
    document.on('data', (part: Buffer) => parts.push(part));
    document.on('end', () => resolve(Buffer.concat(parts)));
    document.on('error', reject);
    document.end();
  });
}
