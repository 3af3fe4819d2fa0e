import { formatNumber } from '../rounding';

/** "70 mL as drugs", "held back 264": what a ghost says beside its line. */
export const ghostWords = (label: string, ml: number): string =>
  label.startsWith('as ') ? `${formatNumber(ml, 1)}\u00a0mL ${label}` : `${label} ${formatNumber(ml, 1)}`;
