import type { NearMiss } from '../db/outcome';

type What = Pick<NearMiss, 'class' | 'limitCode'> & {
  childId?: string;
  versionId?: string;
  kind?: NearMiss['kind'];
  /** As typed or read, with its unit. */
  value?: string;
  /** As allowed or ordered, with its unit. */
  limit?: string;
  detail?: string;
  /** What makes it one of its own: a person, a pump reading. The same again is the same near miss. */
  once?: readonly string[];
};

const MOST = 500;
const short = (text: string | undefined): string | undefined => text?.slice(0, MOST);

/** Something that was stopped, as a row: one for each class, limit, version (else child) and `once`, however often it is tried. */
export const nearMiss = ({ once = [], value, limit, detail, ...what }: What): NearMiss => ({
  ...what,
  value: short(value),
  limit: short(limit),
  detail: short(detail),
  dedupe: [what.class, what.limitCode, what.versionId ?? what.childId ?? '', ...once]
    .join(':')
    .slice(0, MOST),
});
