import PDFDocument from 'pdfkit';
import { FONTS } from '../../server/documents/fonts';
import { orderPdf } from '../../server/documents/order-pdf';
import { samplePaper } from './sample-paper';
import { interleave, round, tell } from './interleave';

type Call = { name: string; args: unknown[] };

/** Every call our sheet makes on pdfkit while it draws the order, so that the baseline draws exactly the same. */
async function recordCalls(): Promise<Call[]> {
  const calls: Call[] = [];
  const prototype = PDFDocument.prototype as unknown as Record<string, (...args: unknown[]) => unknown>;
  const names = [
    'font',
    'fontSize',
    'fillColor',
    'strokeColor',
    'lineWidth',
    'lineCap',
    'text',
    'path',
    'moveTo',
    'lineTo',
    'rect',
    'roundedRect',
    'circle',
    'fill',
    'stroke',
    'clip',
    'dash',
    'undash',
    'save',
    'restore',
    'translate',
    'scale',
    'rotate',
    'fillOpacity',
    'addPage',
    'switchToPage',
    'widthOfString',
    'heightOfString',
  ];
  const originals = new Map(names.map((name) => [name, prototype[name]]));
  let depth = 0;
  for (const name of names) {
    const original = prototype[name]!;
    prototype[name] = function (this: unknown, ...args: unknown[]) {
      // pdfkit's methods call each other: only ours count
      if (depth === 0) calls.push({ name, args });
      depth += 1;
      try {
        return original.apply(this, args);
      } finally {
        depth -= 1;
      }
    };
  }
  try {
    await orderPdf(samplePaper());
  } finally {
    for (const [name, original] of originals) prototype[name] = original!;
  }
  return calls;
}

async function bare(calls: readonly Call[]): Promise<number> {
  const started = performance.now();
  const doc = new PDFDocument({
    size: 'A4',
    margin: 0,
    bufferPages: true,
    autoFirstPage: false,
    lang: 'en-GB',
    displayTitle: true,
  });
  for (const [name, font] of Object.entries(FONTS)) doc.registerFont(name, font);
  const target = doc as unknown as Record<string, (...args: unknown[]) => unknown>;
  for (const { name, args } of calls) target[name]!(...args);
  await new Promise<void>((resolve) => {
    doc.on('end', () => resolve());
    doc.resume();
    doc.end();
  });
  return performance.now() - started;
}

async function ours(): Promise<number> {
  const started = performance.now();
  await orderPdf(samplePaper());
  return performance.now() - started;
}

/** One order PDF against the same drawing calls in bare pdfkit, milliseconds. */
export async function benchPdf(): Promise<void> {
  const calls = await recordCalls();
  const { subject, baseline, ratio } = await interleave(15, ours, () => bare(calls));
  tell(
    'order PDF',
    `${round(subject)} ms, bare pdfkit ${round(baseline)} ms, ratio ${round(ratio)}`,
    '≤ 1.2',
  );
}
