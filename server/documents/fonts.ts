import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);
const read = (file: string): Buffer => readFileSync(require.resolve(`source-sans/TTF/${file}`));

/** Source Sans 3 as TTF: the web fonts (woff2) break inside pdfkit on composite glyphs. Read once a process. */
export const FONTS = {
  regular: read('SourceSans3-Regular.ttf'),
  semibold: read('SourceSans3-Semibold.ttf'),
  bold: read('SourceSans3-Bold.ttf'),
} as const;
export type Weight = keyof typeof FONTS;
