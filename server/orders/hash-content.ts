import { contentText } from '@shared/orders/build-content';
import type { OrderContent } from '@shared/orders/content';
import { createHash } from 'node:crypto';

export type HashedContent = { content: OrderContent; text: string; sha256: string };

/** Content with its canonical bytes and their SHA-256, as they are signed and stored. */
export function hashContent(content: OrderContent): HashedContent {
  const text = contentText(content);
  return { content, text, sha256: createHash('sha256').update(text, 'utf8').digest('hex') };
}
