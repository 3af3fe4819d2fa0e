import { execFileSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { OrderPaper } from '../../../server/documents/order-paper';
import { orderPdf } from '../../../server/documents/order-pdf';
import { sampleContent, samplePaper } from '../../bench/sample-paper';

const folder = mkdtempSync(join(tmpdir(), 'brimline-pdf-'));

async function print(
  change: Partial<OrderPaper> = {},
): Promise<{ text: string; fonts: string; info: string }> {
  const file = join(folder, `${Math.random().toString(36).slice(2)}.pdf`);
  writeFileSync(file, await orderPdf(samplePaper(change)));
  const run = (program: string, ...args: string[]) => execFileSync(program, args, { encoding: 'utf8' });
  return {
    text: run('pdftotext', '-layout', file, '-'),
    fonts: run('pdffonts', file),
    info: run('pdfinfo', file),
  };
}

// read back with poppler, a reader that is not ours
describe('the printed order', () => {
  it('says child, figure, fluid, brims, signatures and code, on one A4 page', async () => {
    const { text, info } = await print();
    for (const words of [
      'Hartnoll,',
      'SM 418 207',
      '16.4 kg',
      '52',
      'mL/h',
      '1250 mL over 24 h',
      'Ibuprofen: wheeze',
      'Raised ADH risk',
      'BL-260610-014',
      'version 2',
      'Holliday & Segar 1957',
      'Dr Noor Castellane',
      'Ruth Ansah',
      'ABCDE 23456 7FGHI JKLMN',
      'Void if revised',
      'At the bedside',
    ])
      expect(text).toContain(words);
    expect(text).toContain('follow local policy');
    expect(text.replace(/\s+/g, '')).toContain('9f'.repeat(32));
    expect(info).toMatch(/Pages:\s+1\n/);
    expect(info).toMatch(/Page size:\s+595\.\d+ x 841\.\d+ pts \(A4\)/);
  });

  it('embeds Source Sans 3 and nothing else', async () => {
    const { fonts } = await print();
    const rows = fonts.trim().split('\n').slice(2);
    expect(rows.length).toBeGreaterThanOrEqual(3);
    for (const row of rows) {
      expect(row).toContain('SourceSans3');
      // columns: emb sub uni
      expect(row).toMatch(/ yes yes yes /);
    }
  });

  it('prints no trailing zero in a dose', async () => {
    const content = sampleContent();
    const { text } = await print({
      content: {
        ...content,
        figures: { ...content.figures, rateMlPerH: '44.0', volumeMl: '1056.0' },
        weight: { ...content.weight, kg: '16.000' },
      },
    });
    expect(text).toContain('1056 mL over 24 h');
    expect(text).toMatch(/\b16 kg/);
    expect(text).not.toMatch(/44\.0|1056\.0|16\.0/);
  });

  it.each(['Draft, not signed', 'Not signed', 'Revised, void', 'Lapsed', 'Withdrawn', 'Ended'] as const)(
    'is marked across the page when it is %s',
    async (watermark) => {
      const { text } = await print({ watermark });
      expect(text).toContain(`Not in force: ${watermark.toLowerCase()}`);
      // nothing to tick, and no pump to set, on a paper nobody may follow
      expect(text).not.toContain('At the bedside');
      expect(text).not.toContain('Set the pump to');
      // the words run diagonally and come out letter by letter: the letters it adds are counted
      const flat = (words: string) => words.replace(/\s+/g, '');
      const bedside =
        'At the bedside before each bag Bag Child, two identifiers Bag, batch and expiry Pump rate and volume Line traced, site looked at Time Two initials 1 2 3';
      const lead = flat(`Not in force: ${watermark}`).length - flat('Set the pump to').length;
      const plain = flat((await print()).text).length - flat(bedside).length + lead;
      expect(flat(text).length - plain).toBe(flat(watermark).length);
    },
  );

  it('gives a void signature its word, and tells of a corrected name', async () => {
    const paper = samplePaper();
    const { text } = await print({
      signatures: paper.signatures.map((signature) => ({ ...signature, isVoid: true })),
      nameCorrectedSince: 'Hartnell, Edie',
    });
    expect(text).toContain('void: drew up the order');
    expect(text).toContain('Hartnell, Edie');
  });

  it('goes on to a second page rather than squeezing, each with its number and foot', async () => {
    const content = sampleContent();
    const many = Array.from({ length: 14 }, (_, i) => ({
      ...content.limits[0]!,
      code: `c${i}`,
      title: `Caution number ${i}`,
      text: 'A sentence that takes a line of its own on the paper, so that there are many lines to print here.',
    }));
    const { text, info } = await print({ content: { ...content, limits: many } });
    expect(info).toMatch(/Pages:\s+2\n/);
    expect(text).toContain('page 1 of 2');
    expect(text).toContain('page 2 of 2');
    expect(text.match(/Void if revised/g)).toHaveLength(2);
    expect(text).toContain('Caution number 13');
  });
});
