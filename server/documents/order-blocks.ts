import { formatCivilDate, formatDateTime, parseInstant } from '@shared/time';
import { FLAG_WORDS } from '@shared/children/flags';
import { formatNumber } from '@shared/rounding';
import { METHOD_WORDS } from '@shared/weights/chart-weight';
import type { OrderPaper } from './order-paper';
import { bigNumber, INK, PAGE, type Sheet } from './sheet';

export const WIDTH = PAGE.right - PAGE.left;
export const SPLIT = { left: 246, gap: 24, rightX: PAGE.left + 270, rightWidth: WIDTH - 270 } as const;

/** Stored instants are RFC 3339 of the program's own making; anything else is our bug. */
export const when = (text: string, zone: string): string => {
  const at = parseInstant(text);
  if (at === undefined) throw new RangeError(`not an instant: ${text}`);
  return formatDateTime(at, zone);
};

const SEX_WORDS = { female: 'Female', male: 'Male' } as const;

/** The product's mark: a vessel, its brim, one dot inside and one outside. */
const mark = (sheet: Sheet, x: number, y: number, size: number): void => {
  const { doc } = sheet;
  doc.save();
  doc.translate(x, y).scale(size / 24);
  doc
    .path('M4.5 2.5V17a5.5 5.5 0 0 0 11 0V2.5')
    .lineWidth(2.3)
    .lineCap('round')
    .strokeColor(INK.ink)
    .stroke();
  doc.moveTo(1, 9.5).lineTo(23.5, 9.5).lineWidth(2.4).lineCap('butt').strokeColor(INK.brim).stroke();
  doc.circle(10, 5.3, 1.9).fillColor(INK.ink).fill();
  doc.circle(20, 5.3, 1.9).fillColor(INK.ink).fill();
  doc.restore();
};

export const headBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  const { content } = paper;
  mark(sheet, PAGE.left, y + 8, 24);
  sheet.text('Brimline', PAGE.left + 33, y + 7, { size: 18, weight: 'bold' });
  sheet.line(PAGE.left + 119, y, PAGE.left + 119, y + 40, 1, INK.rule);
  sheet.text('Intravenous fluid order', PAGE.left + 138, y - 5, { size: 24, weight: 'bold' });
  const place = [
    paper.hospitalName,
    paper.wardName && `${paper.wardName} ward`,
    paper.bed && `bed ${paper.bed}`,
  ]
    .filter(Boolean)
    .join(', ');
  sheet.text(place, PAGE.left + 138, y + 24, { color: INK.soft });
  sheet.text(content.code, PAGE.right, y - 1, { size: 17, weight: 'bold', align: 'right' });
  sheet.text(`version ${content.version}`, PAGE.right, y + 22, { color: INK.soft, align: 'right' });
  sheet.line(PAGE.left, y + 50, PAGE.right, y + 50, 2);
  return y + 58;
};

type Cell = { label: string; value: string; x: number; width: number };
const cells = (sheet: Sheet, list: readonly Cell[], y: number): number => {
  const heights = list.map(({ label, value, x, width }) => {
    sheet.text(label, x, y, { size: 12, color: INK.soft });
    return sheet.paragraph(value, x, y + 15, width, { size: 14, weight: 'semibold', lineHeight: 18 });
  });
  return y + 15 + Math.max(18, ...heights) + 6;
};

/** Surname over given name where both do not fit beside the facts; returns the right edge used. */
const nameBlock = (sheet: Sheet, child: OrderPaper['content']['child'], y: number): number => {
  const big = { size: 24, weight: 'bold' } as const;
  const surname = sheet.paragraph(`${child.surname},`, PAGE.left, y - 2, 186, { ...big, lineHeight: 27 });
  sheet.paragraph(child.given, PAGE.left, y - 2 + surname, 186, { size: 24, lineHeight: 27 });
  return PAGE.left + 186;
};

export const childBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  const { child, weight } = paper.content;
  const { zone } = paper;
  const nameRight = nameBlock(sheet, child, y);
  const flags = child.flags.map((flag) => FLAG_WORDS[flag].label).join('; ') || 'None';
  const born = child.bornAt ? when(child.bornAt, zone) : formatCivilDate(child.bornOn);
  const left = nameRight + 16;
  const column = (PAGE.right - left) / 4;
  const at = (n: number) => left + n * column;
  let next = cells(
    sheet,
    [
      { label: 'Born', value: `${born}, ${child.ageText}`, x: at(0), width: column - 12 },
      { label: 'Hospital no.', value: child.number, x: at(1), width: column - 12 },
      {
        label: 'Sex',
        value: child.sex ? SEX_WORDS[child.sex] : 'Not recorded',
        x: at(2),
        width: column - 12,
      },
      { label: 'Dosing weight', value: `${plain(weight.kg)} kg`, x: at(3), width: column },
    ],
    y - 4,
  );
  next = cells(
    sheet,
    [
      {
        label: 'Weighed',
        value: `${when(weight.at, zone)}, ${METHOD_WORDS[weight.method]}`,
        x: at(0),
        width: column * 1.3 - 12,
      },
      { label: 'Allergies', value: child.allergies, x: at(2), width: column - 8 },
      { label: 'Flags', value: flags, x: at(3), width: column },
    ],
    next,
  );
  if (paper.nameCorrectedSince) {
    next +=
      sheet.paragraph(
        `Name corrected since signing: now ${paper.nameCorrectedSince}.`,
        PAGE.left,
        next,
        WIDTH,
        { weight: 'semibold' },
      ) + 4;
  }
  return next + 2;
};

/** A stored decimal ("44.0") as it is printed: no trailing zero in a dose. */
export const plain = (text: string | null): string => (text === null ? '' : formatNumber(Number(text), 3));

/** The figure that goes on the pump, or the dose where nothing is pumped. */
const mainFigure = ({
  figures,
  kind,
}: OrderPaper['content']): { label: string; number: string; unit: string; under: string } => {
  if (kind === 'maintenance')
    return {
      label: 'Set the pump to',
      number: plain(figures.rateMlPerH),
      unit: 'mL/h',
      under: `${plain(figures.volumeMl)} mL over ${plain(figures.hours)} h`,
    };
  const pump = figures.rateMlPerH === null ? '' : `, pump ${plain(figures.rateMlPerH)} mL/h`;
  return {
    label: 'Give once',
    number: plain(figures.volumeMl),
    unit: 'mL',
    under: `over ${plain(figures.overMinutes)} min${pump}`,
  };
};

export const figureBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  const { content, zone } = paper;
  const main = mainFigure(content);
  sheet.line(PAGE.left, y, PAGE.right, y, 1);
  const label = paper.watermark ? `Not in force: ${paper.watermark.toLowerCase()}` : main.label;
  sheet.text(label, PAGE.left, y + 10, { weight: 'semibold', color: paper.watermark ? INK.brim : INK.ink });
  const wide = bigNumber(sheet, main.number, PAGE.left - 3, y + 8, 84);
  sheet.text(main.unit, PAGE.left + wide + 10, y + 62, { size: 22, color: INK.soft });
  sheet.text(main.under, PAGE.left, y + 108, { size: 14 });
  let right = y + 12;
  right += sheet.paragraph(content.readBack, SPLIT.rightX, right, SPLIT.rightWidth, {
    size: 14,
    weight: 'semibold',
    lineHeight: 20,
  });
  const lines = [
    `Reason: ${content.reason.replace(/\.$/, '')}.`,
    `Start ${when(content.plannedStart, zone)}, by ${when(content.startBy, zone)} at the latest.`,
    `Lapses ${when(content.lapsesAt, zone)}.${content.reviewBy ? ` Review by ${when(content.reviewBy, zone)}.` : ''}`,
    content.bloodsBy ? `Blood tests by ${when(content.bloodsBy, zone)}.` : '',
  ].filter(Boolean);
  for (const words of lines)
    right += sheet.paragraph(words, SPLIT.rightX, right, SPLIT.rightWidth, { size: 14, lineHeight: 20 });
  const bottom = Math.max(y + 132, right + 8);
  sheet.line(PAGE.left, bottom, PAGE.right, bottom, 1);
  return bottom + 9;
};

export const heading = (
  sheet: Sheet,
  words: string,
  note: string,
  x: number,
  y: number,
  right: number,
): number => {
  sheet.text(words, x, y, { size: 14, weight: 'bold' });
  if (note) sheet.text(note, right, y + 1, { color: INK.soft, align: 'right' });
  sheet.line(x, y + 21, right, y + 21, 1);
  return y + 22;
};

type StepLine = OrderPaper['content']['steps'][number];

/** One line of the workings; the answer is larger and closed by a double rule. Returns its height. */
const stepLine = (sheet: Sheet, step: StepLine, x: number, row: number): number => {
  const { right } = PAGE;
  const isAnswer = step.mark === 'answer';
  const height = isAnswer ? 29 : 21;
  const color = step.mark === 'stop' ? INK.brim : INK.ink;
  const middle = row + (height - 18) / 2;
  const result = isAnswer
    ? ({ size: 20, weight: 'bold' } as const)
    : ({ size: 13, weight: 'semibold' } as const);
  if (step.mark === 'sum' || isAnswer) sheet.line(x + 100, row, right, row, 1);
  sheet.text(step.label, x, middle, { weight: isAnswer ? 'semibold' : 'regular', color });
  sheet.text(step.working, x + 112, middle, {});
  sheet.text(step.result, right - 142, isAnswer ? row + 2 : middle, { ...result, color, align: 'right' });
  sheet.text(step.unit, right - 136, middle, { color: INK.soft });
  sheet.text(step.source, right, middle + 1, { size: 11, color: INK.soft, align: 'right' });
  return height;
};

export const workingsBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  const { rightX: x } = SPLIT;
  const { right } = PAGE;
  let row = heading(sheet, 'Workings', '', x, y, right);
  const top = row;
  for (const step of paper.content.steps) {
    row += stepLine(sheet, step, x, row);
    if (step.mark === 'answer') {
      sheet.line(x, row, right, row, 1);
      sheet.line(x, row + 2.5, right, row + 2.5, 1);
    } else {
      sheet.line(x, row, right, row, 0.7, INK.rule);
    }
  }
  sheet.line(x + 102, top, x + 102, row, 1, INK.tide);
  return row + 11;
};

type Give = OrderPaper['content']['gives'][number];
const giveCell = (sheet: Sheet, given: Give, left: number, row: number, hasRule: boolean): void => {
  sheet.text(given.label, left, row + 4, { size: 12, color: INK.soft });
  const wide = sheet.text(given.text, left, row + 18, { size: 17, weight: 'semibold' });
  sheet.text(given.unit, left + wide + 4, row + 23, { size: 12, color: INK.soft });
  if (hasRule) sheet.line(left - 12, row, left - 12, row + 44, 0.7, INK.rule);
};

export const givesBlock = (sheet: Sheet, paper: OrderPaper, y: number): number => {
  const { rightX: x, rightWidth } = SPLIT;
  const { gives, otherBrims, gauge } = paper.content;
  const shown = gives.slice(0, 6);
  let row = heading(sheet, 'What this gives', '', x, y, PAGE.right);
  const column = rightWidth / 3;
  shown.forEach((given, index) => {
    const place = index % 3;
    const left = x + place * column + (place === 0 ? 0 : 12);
    giveCell(sheet, given, left, row, place > 0);
    if (place === 2 || index === shown.length - 1) {
      row += 44;
      sheet.line(x, row, PAGE.right, row, 0.7, INK.rule);
    }
  });
  const brims = [
    `Volume ${plain(gauge.orderMl)} of ${plain(gauge.brimMl)} mL ${gauge.brimNote}`,
    ...otherBrims.map((brim) => `${brim.label} ${brim.text}`),
  ].join('. ');
  const label = 'Brims applied. ';
  row += 8;
  row += sheet.paragraph(`${label}${brims}. Rulebook ${paper.content.rulebook.number}.`, x, row, rightWidth, {
    lineHeight: 18,
  });
  return row + 8;
};
