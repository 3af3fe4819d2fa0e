import type { ReactNode } from 'react';
import { IdentityStrip } from '@/components/ui/identity-strip';
import { SEX_WORDS } from '@shared/checks/words';
import { flagLabels } from '@shared/children/flags';
import type { OrderContent } from '@shared/orders/content';
import type { CheckPage } from '@shared/routes/checks';
import { formatCivilDate, formatDateTime, formatDayTime, parseInstant } from '@shared/time';
import { kgText, METHOD_WORDS } from '@shared/weights/chart-weight';

type Ordered = Pick<OrderContent, 'weight'>;

/** The ordered weight: on a check it exists only after lock-in, of what was given it is a fact of the chart. */
function weightOf({ uncovered, zone }: CheckPage, given: Ordered | undefined) {
  const ordered = given ?? uncovered?.content;
  if (ordered === undefined) return 'covered' as const;
  const { kg, method, at } = ordered.weight;
  const moment = parseInstant(at);
  const when = moment === undefined ? '' : `${formatDayTime(moment, zone)}, `;
  const agrees = uncovered?.comparison.rows.find(({ field }) => field === 'weightKg')?.agrees ?? true;
  return {
    text: kgText(Number(kg)),
    how: agrees ? `${when}${METHOD_WORDS[method]}` : 'as ordered, not yours',
  };
}

type CheckStripProps = { page: CheckPage; given?: Ordered; children?: ReactNode };

/** Who the child is. Works without a session of its own, as the page beside the author has none. */
export function CheckStrip({ page, given, children }: CheckStripProps) {
  const { child, zone } = page;
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  return (
    <IdentityStrip
      name={{ surname: child.surname, given: child.given }}
      born={bornAt === undefined ? formatCivilDate(child.bornOn) : formatDateTime(bornAt, zone)}
      age={child.ageText}
      hospitalNumber={child.number}
      sex={SEX_WORDS[child.sex ?? 'not-recorded']}
      weight={weightOf(page, given)}
      allergies={child.allergies}
      flags={flagLabels(child.flags)}
    >
      {children}
    </IdentityStrip>
  );
}
