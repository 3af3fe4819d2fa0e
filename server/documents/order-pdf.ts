import QRCode from 'qrcode';
import { formatDateTime } from '@shared/time';
import { gaugeBlock } from './gauge-block';
import { childBlock, figureBlock, givesBlock, headBlock, SPLIT, when, workingsBlock } from './order-blocks';
import { bedsideBlock, cautionsBlock, signedBlock } from './signing-blocks';
import type { OrderPaper, Watermark } from './order-paper';
import { INK, openSheet, PAGE, type Sheet } from './sheet';

const FOOT = 122;

const qr = (sheet: Sheet, text: string, x: number, y: number, size: number): void => {
  const { modules } = QRCode.create(text, { errorCorrectionLevel: 'M' });
  const cell = size / modules.size;
  for (let row = 0; row < modules.size; row += 1) {
    for (let column = 0; column < modules.size; column += 1) {
      if (modules.get(row, column))
        sheet.doc.rect(x + column * cell, y + row * cell, cell + 0.05, cell + 0.05);
    }
  }
  sheet.doc.fillColor('#000000').fill();
};

const footBlock = (sheet: Sheet, paper: OrderPaper): void => {
  const { print, content, zone } = paper;
  const y = PAGE.bottom - FOOT + 10;
  sheet.line(PAGE.left, y, PAGE.right, y, 2);
  qr(sheet, print.url, PAGE.left, y + 12, 92);
  const x = PAGE.left + 110;
  const width = PAGE.right - x;
  let row = y + 10;
  row += sheet.paragraph(
    'Void if revised. Check before each bag that this paper is current: scan, or look up its code.',
    x,
    row,
    width,
    { size: 15, weight: 'bold', lineHeight: 20 },
  );
  const small = { size: 12, color: INK.soft, lineHeight: 16 } as const;
  row +=
    sheet.paragraph(
      `Paper code ${print.code.replace(/(.{5})(?=.)/g, '$1 ')}. Printed ${formatDateTime(print.at, zone)} by ${print.by}. Lapses ${when(content.lapsesAt, zone)}. Times in ${zone}. A paper copy never starts a pump on its own.`,
      x,
      row + 2,
      width,
      small,
    ) + 2;
  row += sheet.paragraph(`Ledger row ${print.ledgerSeq}: ${print.ledgerHash}`, x, row, width, {
    ...small,
    size: 10,
  });
  sheet.paragraph(
    'Supports, does not replace, clinical judgement; follow local policy; only licensed clinicians prescribe, check and give.',
    x,
    row,
    width,
    small,
  );
};

const watermark = (sheet: Sheet, words: Watermark): void => {
  const { doc } = sheet;
  doc.save();
  doc.rotate(-52, { origin: [PAGE.width / 2, PAGE.height / 2] });
  doc.fillOpacity(0.55);
  sheet.text(words, PAGE.width / 2, PAGE.height / 2 - 60, {
    size: 104,
    weight: 'bold',
    color: INK.watermark,
    align: 'center',
  });
  doc.restore();
};

/** Page numbers, watermark and foot on every page, once their number is known. */
const dressPages = (sheet: Sheet, paper: OrderPaper): void => {
  const { start, count } = sheet.doc.bufferedPageRange();
  for (let page = start; page < start + count; page += 1) {
    sheet.doc.switchToPage(page);
    sheet.text(`page ${page - start + 1} of ${count}`, PAGE.right, PAGE.bottom + 4, {
      size: 11,
      color: INK.soft,
      align: 'right',
    });
    sheet.text(`${paper.content.code}, version ${paper.content.version}`, PAGE.left, PAGE.bottom + 4, {
      size: 11,
      color: INK.soft,
    });
  }
};

/**
 * An order as one A4 page (two where cautions are many), as PDF bytes.
 * Figures come from the signed content alone, so paper and signature cannot differ.
 */
export async function orderPdf(paper: OrderPaper): Promise<Buffer> {
  const sheet = openSheet(`Order ${paper.content.code}, version ${paper.content.version}`);
  if (paper.watermark) watermark(sheet, paper.watermark);
  let y = headBlock(sheet, paper, PAGE.top);
  y = childBlock(sheet, paper, y);
  y = figureBlock(sheet, paper, y);
  const gaugeBottom = gaugeBlock(sheet, paper.content.gauge, PAGE.left, y, SPLIT.left);
  const right = givesBlock(sheet, paper, workingsBlock(sheet, paper, y));
  y = Math.max(gaugeBottom, right);
  const next = (needed: number) => {
    if (y + needed <= PAGE.bottom - FOOT) return;
    footBlock(sheet, paper);
    sheet.newPage();
    if (paper.watermark) watermark(sheet, paper.watermark);
    y = headBlock(sheet, paper, PAGE.top);
  };
  const cautions = paper.content.limits.filter(
    ({ strength, met }) => !met && (strength === 'caution' || strength === 'senior'),
  ).length;
  next(cautions * 36 + 40);
  y = cautionsBlock(sheet, paper, y);
  next(60 + paper.signatures.length * 34);
  y = signedBlock(sheet, paper, y);
  // boxes to tick would invite someone to follow it
  if (paper.watermark === null) {
    next(126);
    bedsideBlock(sheet, y);
  }
  footBlock(sheet, paper);
  dressPages(sheet, paper);
  return sheet.finish();
}
