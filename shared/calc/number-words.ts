import { formatNumber } from '../rounding';

const SMALL = (
  'zero one two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen ' +
  'seventeen eighteen nineteen'
).split(' ');
const TENS = ' ten twenty thirty forty fifty sixty seventy eighty ninety'.split(' ');

/** A number as it is read aloud, decimals digit by digit: 104 "one hundred and four", 52.1 "fifty-two point one". */
export function numberWords(value: number): string {
  const [whole = '0', decimals] = formatNumber(value, 3).split('.');
  const words = wholeWords(Number(whole));
  return decimals === undefined
    ? words
    : `${words} point ${[...decimals].map((digit) => SMALL[Number(digit)]).join(' ')}`;
}

function wholeWords(n: number): string {
  if (n < 20) return SMALL[n] ?? '';
  if (n < 100) return TENS[Math.floor(n / 10)] + (n % 10 ? `-${SMALL[n % 10]}` : '');
  if (n < 1000) return joined(`${SMALL[Math.floor(n / 100)]} hundred`, n % 100);
  if (n < 1_000_000) return joined(`${wholeWords(Math.floor(n / 1000))} thousand`, n % 1000);
  throw new RangeError(`no words for ${n}`);
}

const joined = (head: string, rest: number): string =>
  rest === 0 ? head : `${head}${rest < 100 ? ' and' : ''} ${wholeWords(rest)}`;
