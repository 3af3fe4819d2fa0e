import { childFields, readBirth, type ChildFields } from '@shared/children/schema';
import { ageAt } from '@shared/children/age';
import type { FieldError } from '@shared/problems';
import type { Instant } from '@shared/time';
import { refused, type Refused } from '../db/outcome';
import { readPart } from '../http/read-request';

/** No rulebook takes anyone from this birthday on; an older date of birth is a slip of the pen. */
const ADULT_YEARS = 18;

export type ReadChild = Omit<ChildFields, 'bornAt'> & { bornAt: Instant | null };

const badInput = (errors: FieldError[]): Refused =>
  refused('bad-input', { detail: 'Some entries need another look.', errors });

/** A child's fields as typed, held against the rules of each field and the hospital's clock. */
export function readChildForm(
  body: unknown,
  now: Instant,
  zone: string,
): { ok: true; value: ReadChild } | Refused {
  const read = readPart(childFields, body);
  if (!read.ok) return badInput(read.errors);
  const birth = readBirth(read.value, now, zone);
  if (!birth.ok) return badInput([{ pointer: `/${birth.fault.field}`, detail: birth.fault.message }]);
  if (ageAt({ bornOn: read.value.bornOn }, now, zone).years >= ADULT_YEARS) {
    const detail = `From the ${ADULT_YEARS}th birthday on a person is not registered here.`;
    return badInput([{ pointer: '/bornOn', detail }]);
  }
  return { ok: true, value: { ...read.value, bornAt: birth.bornAt ?? null } };
}
