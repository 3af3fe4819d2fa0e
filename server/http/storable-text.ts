/** Whether PostgreSQL takes a text as it is: no NUL, and no half of a surrogate pair. */
const isStorable = (text: string): boolean => !text.includes('\0') && text.isWellFormed();

/**
 * A reviver for JSON.parse: throws on text, key or value, that the database could not hold as sent. Such text is
 * never typed; stored with a replacement it would no longer be what was sent.
 */
export function storableText(key: string, value: unknown): unknown {
  if (!isStorable(key) || (typeof value === 'string' && !isStorable(value))) {
    throw new SyntaxError('text with characters that cannot be stored');
  }
  return value;
}
