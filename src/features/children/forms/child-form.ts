import { z } from 'zod';
import { SEXES } from '@shared/calc/types';
import { childFields, type ChildFields } from '@shared/children/schema';
import type { ChildHead } from '@shared/routes/children';
import { localDateTime, parseInstant } from '@shared/time';

/** A whole number of a text field, or null where it is empty; anything else is refused by the field's own rule. */
const whole = (text: string): number | null =>
  text.trim() === '' ? null : /^\d{1,2}$/.test(text.trim()) ? Number(text) : NaN;

const typedChild = z.object({
  number: z.string(),
  surname: z.string(),
  given: z.string(),
  bornOn: z.string(),
  bornTime: z.string(),
  sex: z.string(),
  gestationWeeks: z.string(),
  gestationDays: z.string(),
  allergies: z.string(),
  flags: z.array(z.string()),
  bed: z.string().trim().max(20),
  wardId: z.string(),
});
export type TypedChild = z.infer<typeof typedChild>;

export const toFields = (typed: TypedChild): unknown => ({
  ...typed,
  bornAt: typed.bornTime === '' ? null : `${typed.bornOn}T${typed.bornTime}`,
  sex: typed.sex === 'not-recorded' ? null : typed.sex,
  gestationWeeks: whole(typed.gestationWeeks),
  gestationDays: whole(typed.gestationDays),
});

/** Reads the form as typed into the fields of the API; messages land on the field they belong to. */
export const childFormSchema = typedChild.transform(toFields).pipe(
  childFields.extend({
    sex: z.enum(SEXES, 'Choose, or say that it is not recorded.').nullable(),
    bed: z.string(),
    wardId: z.string(),
  }),
);
export type ReadChild = ChildFields & { bed: string; wardId: string };

export const emptyChild = (wardId: string): TypedChild => ({
  number: '',
  surname: '',
  given: '',
  bornOn: '',
  bornTime: '',
  sex: '',
  gestationWeeks: '',
  gestationDays: '',
  allergies: '',
  flags: [],
  bed: '',
  wardId,
});

export const asTyped = (child: ChildHead, zone: string): TypedChild => {
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  return {
    number: child.number,
    surname: child.surname,
    given: child.given,
    bornOn: child.bornOn,
    bornTime: bornAt === undefined ? '' : localDateTime(bornAt, zone).slice(11, 16),
    sex: child.sex ?? 'not-recorded',
    gestationWeeks: child.gestationWeeks === null ? '' : String(child.gestationWeeks),
    gestationDays: child.gestationDays === null ? '' : String(child.gestationDays),
    allergies: child.allergies,
    flags: [...child.flags],
    bed: child.bed ?? '',
    wardId: child.ward?.id ?? '',
  };
};
