import type { Config } from 'tailwindcss';

const token = (name: string) => `var(--${name})`;
const tokens = (names: readonly string[]) => Object.fromEntries(names.map((name) => [name, token(name)]));

/** The tokens live in src/styles/tokens.css; components read them only through these names. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...tokens(['paper', 'surface', 'ink', 'ink-soft', 'rule', 'edge', 'engrave', 'fill', 'fill-plum']),
      ...tokens(['tide', 'tide-deep', 'tide-soft', 'on-tide']),
      ...tokens(['brim', 'brim-deep', 'brim-soft', 'on-brim']),
      ...tokens(['ochre', 'ochre-soft', 'leaf', 'leaf-soft']),
      ...tokens(['plum', 'plum-deep', 'plum-soft', 'on-plum']),
    },
    fontSize: {
      tag: ['12px', '16px'],
      note: ['13px', '18px'],
      small: ['14px', '20px'],
      base: ['15px', '22px'],
      under: ['17px', '24px'],
      lead: ['20px', '26px'],
      form: ['26px', '32px'],
      page: ['34px', '40px'],
    },
    fontFamily: { sans: ['var(--font)'] },
    fontWeight: { normal: '400', semibold: '600', bold: '700' },
    borderRadius: { none: '0', chip: '3px', DEFAULT: '4px', full: '9999px' },
    boxShadow: {},
    screens: { mid: '760px', wide: '1280px' },
    extend: {
      spacing: {
        s1: '4px',
        s2: '8px',
        s3: '12px',
        s4: '16px',
        s5: '24px',
        s6: '32px',
        s7: '48px',
        s8: '64px',
        page: 'var(--edge-page)',
      },
      maxWidth: { prose: '62ch' },
    },
  },
} satisfies Config;
