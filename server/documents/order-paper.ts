import type { OrderContent } from '@shared/orders/content';
import type { Instant } from '@shared/time';

export type PaperSignature = {
  who: string;
  role: string;
  registrationNumber: string;
  at: Instant;
  what: string;
  isVoid: boolean;
};

/** Diagonal words across a paper that must not be used. */
export type Watermark =
  'Draft, not signed' | 'Not signed' | 'Revised, void' | 'Lapsed' | 'Withdrawn' | 'Ended';

/** Everything an order's paper shows; built from the content and the print, never from query columns. */
export type OrderPaper = {
  content: OrderContent;
  hospitalName: string;
  zone: string;
  wardName: string | null;
  bed: string | null;
  watermark: Watermark | null;
  signatures: readonly PaperSignature[];
  nameCorrectedSince: string | null;
  print: { code: string; url: string; at: Instant; by: string; ledgerSeq: number; ledgerHash: string };
};
