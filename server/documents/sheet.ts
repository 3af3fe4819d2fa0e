import PDFDocument from 'pdfkit';
import { FONTS, type Weight } from './fonts';

/** Paper is always the day theme on white; brim lines, hatches and glyphs must survive greyscale. */
export const INK = {
  ink: '#16262B',
  soft: '#51636A',
  rule: '#D8D1C2',
  edge: '#778385',
  tide: '#0E5A62',
  tideSoft: '#DCEBEA',
  brim: '#A3173F',
  leaf: '#2F6B3A',
  white: '#FFFFFF',
  watermark: '#C9CDCE',
} as const;

/** Drawing is in CSS pixels of a 794 × 1123 page, as the screens are. */
export const PAGE = { width: 794, height: 1123, left: 46, right: 748, top: 38, bottom: 1093 } as const;
const PX = 595.28 / PAGE.width;

export type TextStyle = {
  size?: number;
  weight?: Weight;
  color?: string;
  width?: number;
  align?: 'left' | 'right' | 'center';
  lineHeight?: number;
};

export type Sheet = {
  doc: PDFKit.PDFDocument;
  /** One line at a baseline-free top-left corner; returns its width. */
  text(words: string, x: number, y: number, style?: TextStyle): number;
  /** Wrapped text; returns the height used. */
  paragraph(words: string, x: number, y: number, width: number, style?: TextStyle): number;
  widthOf(words: string, style?: TextStyle): number;
  line(x1: number, y1: number, x2: number, y2: number, width?: number, color?: string): void;
  newPage(): void;
  finish(): Promise<Buffer>;
};

const start = (title: string): PDFKit.PDFDocument => {
  const doc = new PDFDocument({
    size: 'A4',
    margin: 0,
    bufferPages: true,
    autoFirstPage: false,
    lang: 'en-GB',
    displayTitle: true,
    info: { Title: title, Creator: 'Brimline', Producer: 'Brimline' },
  });
  for (const weight of Object.keys(FONTS) as Weight[]) doc.registerFont(weight, FONTS[weight]);
  return doc;
};

/** A4 in Source Sans 3, embedded, measured in CSS pixels. */
export function openSheet(title: string): Sheet {
  const doc = start(title);
  const newPage = () => {
    doc.addPage();
    doc.scale(PX);
  };
  newPage();
  const set = ({ size = 13, weight = 'regular', color = INK.ink }: TextStyle) =>
    doc.font(weight).fontSize(size).fillColor(color);
  const widthOf = (words: string, style: TextStyle = {}) => {
    set(style);
    return doc.widthOfString(words);
  };
  return {
    doc,
    widthOf,
    text(words, x, y, style = {}) {
      set(style);
      const width = doc.widthOfString(words);
      const shift = style.align === 'right' ? width : style.align === 'center' ? width / 2 : 0;
      doc.text(words, x - shift, y, { lineBreak: false });
      return width;
    },
    paragraph(words, x, y, width, style = {}) {
      set(style);
      const lineGap = style.lineHeight ? style.lineHeight - doc.currentLineHeight(true) : 0;
      // a height of its own keeps pdfkit from breaking the page: it compares our pixels with points
      const options = { width, lineGap, align: style.align ?? 'left', height: 10_000 } as const;
      const height = doc.heightOfString(words, options);
      doc.text(words, x, y, options);
      return height;
    },
    line(x1, y1, x2, y2, width = 1, color = INK.ink) {
      doc.moveTo(x1, y1).lineTo(x2, y2).lineWidth(width).strokeColor(color).stroke();
    },
    newPage,
    finish: () =>
      new Promise((resolve, reject) => {
        const chunks: Buffer[] = [];
        doc.on('data', (chunk: Buffer) => chunks.push(chunk));
        doc.on('end', () => resolve(Buffer.concat(chunks)));
        doc.on('error', reject);
        doc.end();
      }),
  };
}

/** Number with its decimals set smaller, so that 44.5 is not read as 445; returns the width used. */
export function bigNumber(
  sheet: Sheet,
  number: string,
  x: number,
  y: number,
  size: number,
  color: string = INK.ink,
): number {
  const [whole = '', decimals] = number.split('.');
  const wide = sheet.text(whole, x, y, { size, weight: 'semibold', color });
  if (decimals === undefined) return wide;
  const small = size * 0.62;
  // both stand on one baseline: Source Sans 3's ascender is 1.024 em
  return (
    wide +
    sheet.text(`.${decimals}`, x + wide, y + (size - small) * 1.024, {
      size: small,
      weight: 'semibold',
      color,
    })
  );
}
