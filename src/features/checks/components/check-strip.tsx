import type { ReactNode } from 'react';
import { IdentityStrip } from '@/components/ui/identity-strip';
import { SEX_WORDS } from '@shared/checks/words';
import { flagLabels } from '@shared/children/flags';
import type { CheckPage } from '@shared/routes/checks';
import { formatCivilDate, formatDateTime, formatDayTime, parseInstant } from '@shared/time';
import { kgText, METHOD_WORDS } from '@shared/weights/chart-weight';

/** The ordered weight, which exists on this page only after lock-in. */
function weightOf({ uncovered, zone }: CheckPage) {
  if (uncovered === null) return 'covered' as const;
  const { kg, method, at } = uncovered.content.weight;
  const moment = parseInstant(at);
  const when = moment === undefined ? '' : `${formatDayTime(moment, zone)}, `;
  const agrees = uncovered.comparison.rows.find(({ field }) => field === 'weightKg')?.agrees ?? true;
  return {
    text: kgText(Number(kg)),
    how: agrees ? `${when}${METHOD_WORDS[method]}` : 'as ordered, not yours',
  };
}

/** Who the child is. Works without a session of its own, as the page beside the author has none. */
export function CheckStrip({ page, children }: { page: CheckPage; children?: ReactNode }) {
  const { child, zone } = page;
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  return (
    <IdentityStrip
      name={{ surname: child.surname, given: child.given }}
      born={bornAt === undefined ? formatCivilDate(child.bornOn) : formatDateTime(bornAt, zone)}
      age={child.ageText}
      hospitalNumber={child.number}
      sex={SEX_WORDS[child.sex ?? 'not-recorded']}
      weight={weightOf(page)}
      allergies={child.allergies}
      flags={flagLabels(child.flags)}
    >
      {children}
    </IdentityStrip>
  );
}
