import { civilDate, type Instant } from '@shared/time';
import { sql } from 'drizzle-orm';
import { orderCounters } from '../../db/schema/orders';
import type { Tx } from '../../db/transaction';

/** The next order code of the hospital's day: "BL-260610-014". Numbers of orders that came to nothing are not used again. */
export async function makeCode(tx: Tx, now: Instant, zone: string): Promise<string> {
  const day = civilDate(now, zone);
  const [counter] = await tx
    .insert(orderCounters)
    .values({ day, last: 1 })
    .onConflictDoUpdate({
      target: [orderCounters.hospitalId, orderCounters.day],
      set: { last: sql`${orderCounters.last} + 1` },
    })
    .returning({ last: orderCounters.last });
  const number = String(counter?.last ?? 0).padStart(3, '0');
  return `BL-${day.slice(2).replaceAll('-', '')}-${number}`;
}
