import type { OrderContent } from '@shared/orders/content';
import { drawGauge, type GaugeDrawing } from '@shared/gauge/geometry';
import { ghostWords } from '@shared/gauge/ghost-words';
import type { Text } from '@shared/gauge/labels';
import { INK, type Sheet, type TextStyle } from './sheet';

const HEIGHT = 316;

const stroke = (sheet: Sheet, path: string, color: string, width: number, dash?: [number, number]): void => {
  const { doc } = sheet;
  doc.path(path).lineWidth(width).strokeColor(color);
  if (dash) doc.dash(dash[0], { space: dash[1] });
  doc.stroke();
  if (dash) doc.undash();
};

/** Gauge texts stand on baselines; pdfkit places the top of the line (ascender 1.024 em). */
const word = (sheet: Sheet, { x, y, text }: Text, style: TextStyle & { size: number }): void => {
  sheet.text(text, x, y - style.size * 1.024, style);
};

const fillBlock = (sheet: Sheet, drawing: GaugeDrawing): void => {
  const { doc } = sheet;
  const { left, right, bottom } = drawing.vessel;
  doc.save();
  doc.path(drawing.inside).clip();
  if (drawing.ghostY !== null)
    doc
      .rect(left, drawing.ghostY, right - left, drawing.fillY - drawing.ghostY)
      .fillColor(INK.tideSoft)
      .fill();
  doc
    .rect(left, drawing.fillY, right - left, bottom - drawing.fillY)
    .fillColor(INK.tide)
    .fill();
  doc.restore();
  if (drawing.ghostLine) stroke(sheet, drawing.ghostLine, INK.tide, 1, [3, 3]);
  for (const line of drawing.engraved) stroke(sheet, line, INK.white, 1.5);
  for (const line of drawing.dashed) stroke(sheet, line, INK.edge, 1, [2, 3]);
};

const overBlock = (sheet: Sheet, { over }: GaugeDrawing): void => {
  if (!over) return;
  const { doc } = sheet;
  doc.save();
  doc.rect(over.box.x, over.box.y, over.box.width, over.box.height).clip();
  for (const line of over.hatch) stroke(sheet, line, INK.brim, 1.6);
  doc.restore();
  stroke(sheet, over.outline, INK.brim, 1.5, [4, 3]);
  for (const line of over.words)
    word(sheet, line, { size: 13, weight: 'bold', color: INK.brim, align: 'right' });
};

const marksBlock = (sheet: Sheet, drawing: GaugeDrawing): void => {
  for (const tick of drawing.ticks) {
    const { right } = drawing.vessel;
    stroke(sheet, `M${right + 1} ${tick.y}h${tick.isMajor ? 9 : 5}`, INK.edge, 1);
    if (tick.text) word(sheet, tick.text, { size: 12, color: INK.soft });
  }
  for (const bracket of drawing.brackets) {
    stroke(sheet, bracket.path, INK.soft, 1);
    word(sheet, bracket.label, { size: 13, weight: 'semibold', align: 'right' });
    word(sheet, bracket.volume, { size: 13, color: INK.soft, align: 'right' });
  }
  if (drawing.ghostLabel) {
    if (drawing.ghostLabel.leader) stroke(sheet, drawing.ghostLabel.leader, INK.soft, 1);
    for (const line of drawing.ghostLabel.lines) word(sheet, line, { size: 12, color: INK.soft });
  }
};

const pointerBlock = (sheet: Sheet, { pointer, brim }: GaugeDrawing): void => {
  const { doc } = sheet;
  if (pointer) {
    doc.path(pointer.path).fillColor(INK.tide).fill();
    word(sheet, pointer.volume, { size: 20, weight: 'bold', color: INK.tide });
    word(sheet, pointer.note, { size: 13, color: INK.soft });
  }
  stroke(sheet, brim.line, INK.brim, 2.5);
  doc.path(brim.flag).fillColor(INK.brim).fill();
  word(sheet, brim.title, { size: 13, weight: 'bold', color: INK.white });
  word(sheet, brim.note, { size: 12, weight: 'semibold', color: INK.white });
};

/** The brim gauge of the signed content; returns the y below it. */
export function gaugeBlock(
  sheet: Sheet,
  gauge: OrderContent['gauge'],
  x: number,
  y: number,
  width: number,
): number {
  const drawing = drawGauge({
    orderMl: Number(gauge.orderMl),
    brimMl: Number(gauge.brimMl),
    brimNote: gauge.brimNote,
    bands: gauge.bands.map(({ label, ml, fullMl }) => ({ label, ml: Number(ml), fullMl: Number(fullMl) })),
    ghosts: gauge.ghosts.map(({ label, ml }) => ({ label: ghostWords(label, Number(ml)), ml: Number(ml) })),
    heightPx: HEIGHT,
    widthPx: width,
    vesselPx: 54,
  });
  const { doc } = sheet;
  doc.save();
  doc.translate(x, y);
  fillBlock(sheet, drawing);
  overBlock(sheet, drawing);
  stroke(sheet, drawing.wall, INK.ink, 2);
  marksBlock(sheet, drawing);
  pointerBlock(sheet, drawing);
  doc.restore();
  return y + HEIGHT;
}
