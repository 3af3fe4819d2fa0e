const LONE_SURROGATE = /[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/;

/**
 * The one text of a value: what is signed, hashed and stored.
 *
 * Keys are sorted by code unit, strings and keys are NFC, there is no white space. Numbers other than safe
 * integers throw (decimals travel as strings, see `decimalText`), and so does everything JSON would drop or
 * bend: undefined, holes, dates, class instances, lone surrogates, NUL.
 */
export function canonicalText(value: unknown): string {
  return write(value, '$');
}

function write(value: unknown, path: string): string {
  if (value === null || typeof value === 'boolean') return String(value);
  if (typeof value === 'string') return writeString(value, path);
  if (typeof value === 'number') return writeInteger(value, path);
  if (Array.isArray(value)) {
    // Array.from visits holes, which map() would skip
    return `[${Array.from(value as unknown[], (item, i) => write(item, `${path}[${i}]`)).join(',')}]`;
  }
  if (isPlainObject(value)) return writeObject(value, path);
  throw new TypeError(`canonicalText: ${path} is ${value === undefined ? 'absent' : typeof value}`);
}

function writeString(value: string, path: string): string {
  // PostgreSQL's json cannot hold either, and a hash must never depend on how one is repaired
  if (LONE_SURROGATE.test(value) || value.includes('\0')) {
    throw new TypeError(`canonicalText: ${path} holds a character that is none`);
  }
  return JSON.stringify(value.normalize('NFC'));
}

function writeInteger(value: number, path: string): string {
  if (!Number.isSafeInteger(value)) {
    throw new TypeError(`canonicalText: ${path} is the number ${value}; decimals are written as strings`);
  }
  return String(value);
}

function writeObject(value: Record<string, unknown>, path: string): string {
  const entries = new Map<string, string>();
  for (const key of Object.keys(value)) {
    const name = writeString(key, `${path}.${key}`);
    if (entries.has(name)) throw new TypeError(`canonicalText: ${path}.${key} is there twice`);
    entries.set(name, write(value[key], `${path}.${key}`));
  }
  const names = [...entries.keys()].sort(byUnquotedCodeUnit);
  return `{${names.map((name) => `${name}:${entries.get(name)}`).join(',')}}`;
}

/** Sorts the keys themselves, not their JSON form, in which escapes would change the order. */
function byUnquotedCodeUnit(a: string, b: string): number {
  const left = JSON.parse(a) as string;
  const right = JSON.parse(b) as string;
  return left < right ? -1 : left > right ? 1 : 0;
}

function isPlainObject(value: unknown): value is Record<string, unknown> {
  if (typeof value !== 'object' || value === null) return false;
  const prototype: unknown = Object.getPrototypeOf(value);
  return prototype === Object.prototype || prototype === null;
}

/** A decimal with exactly `scale` places: 44 at scale 1 is "44.0"; throws where the value has more places. */
export function decimalText(value: number, scale: number): string {
  const match = /^(-?\d+)(?:\.(\d+))?$/.exec(String(value));
  if (match === null) throw new RangeError(`decimalText: ${value} has no plain decimal form`);
  const [, whole = '', places = ''] = match;
  if (places.length > scale) throw new RangeError(`decimalText: ${value} has more than ${scale} decimals`);
  return scale === 0 ? whole : `${whole}.${places.padEnd(scale, '0')}`;
}
