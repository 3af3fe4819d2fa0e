import { ageAt, ageText } from '@shared/children/age';
import type { ChildHead } from '@shared/routes/children';
import { toRfc3339, type Instant } from '@shared/time';
import type { children } from '../db/schema/children';

export type ChildRow = Omit<typeof children.$inferSelect, 'surnameKey'>;
export type ChildPlace = { wardId: string | null; wardName: string | null; bed: string | null };

/** A child's age at a moment, by the hospital's calendar. */
export const ageOf = (child: Pick<ChildRow, 'bornOn' | 'bornAt'>, now: Instant, zone: string) =>
  ageAt({ bornOn: child.bornOn, bornAt: child.bornAt ?? undefined }, now, zone);

/** What weighing and scope need to know of a child. */
export const childFactsOf = (child: ChildRow) => ({
  bornOn: child.bornOn,
  bornAt: child.bornAt ?? undefined,
  sex: child.sex ?? undefined,
  gestationWeeks: child.gestationWeeks ?? undefined,
  gestationDays: child.gestationDays ?? undefined,
});

/** The head of every page with a child. */
export function presentChild(child: ChildRow, place: ChildPlace, now: Instant, zone: string): ChildHead {
  return {
    id: child.id,
    number: child.number,
    surname: child.surname,
    given: child.given,
    bornOn: child.bornOn,
    bornAt: child.bornAt === null ? null : toRfc3339(child.bornAt),
    ageText: ageText(ageOf(child, now, zone)),
    sex: child.sex,
    gestationWeeks: child.gestationWeeks,
    gestationDays: child.gestationDays,
    allergies: child.allergies,
    flags: child.flags,
    ward:
      place.wardId === null || place.wardName === null ? null : { id: place.wardId, name: place.wardName },
    bed: place.bed,
    rev: child.rev,
  };
}
