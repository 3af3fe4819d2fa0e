import { formatDateTime } from '@shared/time';
import { heading, WIDTH } from './order-blocks';
import type { OrderPaper } from './order-paper';
import { INK, PAGE, type Sheet } from './sheet';

/** Findings that were met on the way: cautions with the author's reasons, senior matters, each in a line. */
export const cautionsBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  const found = paper.content.limits.filter(
    ({ strength, met }) => !met && strength !== 'information' && strength !== 'brim',
  );
  if (found.length === 0) return y;
  let row = heading(sheet, 'Cautions on this order', '', PAGE.left, y, PAGE.right) + 4;
  for (const { title, text, reason, strength } of found) {
    const lead = strength === 'senior' ? 'Senior decision: ' : '';
    const words = `${lead}${title.replace(/\.$/, '')}. ${text}${reason ? ` Reason given: ${reason}` : ''}`;
    row += sheet.paragraph(words, PAGE.left, row, WIDTH, { lineHeight: 17 }) + 2;
  }
  return row + 10;
};

const RINGS = 'M6.85 11.8A4.1 4.1 0 1 1 8.86 10.04M9.15 4.2A4.1 4.1 0 1 1 7.14 5.96';

export const signedBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  let row = heading(sheet, 'Signed', '', PAGE.left, y, PAGE.right);
  if (paper.signatures.length === 0) {
    sheet.text('Nobody has signed this.', PAGE.left, row + 6, { weight: 'semibold' });
    return row + 34;
  }
  for (const signature of paper.signatures) {
    const { doc } = sheet;
    doc.save();
    doc.translate(PAGE.left, row + 7);
    doc
      .path(RINGS)
      .lineWidth(1.6)
      .lineCap('round')
      .strokeColor(signature.isVoid ? INK.edge : INK.leaf)
      .stroke();
    doc.restore();
    const name = sheet.text(signature.who, PAGE.left + 24, row + 4, { size: 15, weight: 'semibold' });
    sheet.text(signature.role, PAGE.left + 32 + name, row + 6, {
      color: INK.soft,
    });
    sheet.text(formatDateTime(signature.at, paper.zone), PAGE.right - 284, row + 6, {
      weight: 'semibold',
      align: 'right',
    });
    const said = signature.isVoid ? `void: ${signature.what}` : signature.what;
    const what = `${said}, reg. ${signature.registrationNumber}`;
    const height = sheet.paragraph(what, PAGE.right - 270, row + 6, 270, { color: INK.soft, lineHeight: 16 });
    row += Math.max(28, height + 10);
    sheet.line(PAGE.left, row, PAGE.right, row, 0.7, INK.rule);
  }
  return row + 8;
};

const BEDSIDE = [
  { label: 'Bag', x: 0, box: false, rule: 0 },
  { label: 'Child, two identifiers', x: 36, box: true, rule: 0 },
  { label: 'Bag, batch and expiry', x: 168, box: true, rule: 72 },
  { label: 'Pump rate and volume', x: 300, box: true, rule: 72 },
  { label: 'Line traced, site looked at', x: 432, box: true, rule: 0 },
  { label: 'Time', x: 580, box: false, rule: 44 },
  { label: 'Two initials', x: 636, box: false, rule: 66 },
] as const;

export const bedsideBlock = (sheet: Sheet, y: number): number => {
  let row = heading(sheet, 'At the bedside', 'before each bag', PAGE.left, y, PAGE.right);
  for (const column of BEDSIDE)
    sheet.text(column.label, PAGE.left + column.x, row + 4, { size: 12, color: INK.soft });
  row += 24;
  for (const bag of [1, 2, 3]) {
    sheet.line(PAGE.left, row, PAGE.right, row, 0.7, INK.rule);
    sheet.text(String(bag), PAGE.left, row + 4, { weight: 'semibold' });
    for (const { x, box, rule } of BEDSIDE) {
      if (box)
        sheet.doc
          .roundedRect(PAGE.left + x, row + 5, 14, 14, 2)
          .lineWidth(1.4)
          .strokeColor(INK.ink)
          .stroke();
      if (rule > 0)
        sheet.line(
          PAGE.left + x + (box ? 22 : 0),
          row + 22,
          PAGE.left + x + (box ? 22 : 0) + rule,
          row + 22,
          0.8,
          INK.edge,
        );
    }
    row += 24;
  }
  sheet.line(PAGE.left, row, PAGE.right, row, 0.7, INK.rule);
  return row + 10;
};
