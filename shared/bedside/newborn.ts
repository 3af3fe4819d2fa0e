import { ageAt } from '../children/age';
import type { OrderContent } from '../orders/content';
import { parseInstant, type Instant } from '../time';

/** Newborns get shorter volumes on the pump. */
export function isNewbornNow({ child }: OrderContent, at: Instant, zone: string): boolean {
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  return ageAt({ bornOn: child.bornOn, bornAt }, at, zone).isNewborn;
}
