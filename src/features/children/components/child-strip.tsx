import type { ReactNode } from 'react';
import { IdentityStrip } from '@/components/ui/identity-strip';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { FLAG_WORDS } from '@shared/children/flags';
import type { ChildHead, WeightRow } from '@shared/routes/children';
import { formatCivilDate, formatDateTime, parseInstant } from '@shared/time';
import { METHOD_WORDS } from '@shared/weights/chart-weight';

const SEX_WORDS = { female: 'Female', male: 'Male' } as const;

type ChildStripProps = {
  child: ChildHead;
  /** The dosing weight; `covered` on a check page, where its value was never sent; null when there is none. */
  weight: Pick<WeightRow, 'kg' | 'method' | 'at'> | 'covered' | null;
  children?: ReactNode;
  below?: ReactNode;
};

/** "16.4 kg", without the zeros of the stored scale. */
export const kgWords = (kg: string): string => `${String(Number(kg))}\u00a0kg`;

/** The child's head as the API gives it, on every page with a child. */
export function ChildStrip({ child, weight, children, below }: ChildStripProps) {
  const { zone } = useKnownMe().hospital;
  const bornAt = child.bornAt === null ? undefined : parseInstant(child.bornAt);
  const how = (at: string, method: WeightRow['method']) => {
    const moment = parseInstant(at);
    return `${moment === undefined ? '' : `${formatDateTime(moment, zone)}, `}${METHOD_WORDS[method]}`;
  };
  return (
    <IdentityStrip
      name={{ surname: child.surname, given: child.given }}
      born={bornAt === undefined ? formatCivilDate(child.bornOn) : formatDateTime(bornAt, zone)}
      age={child.ageText}
      hospitalNumber={child.number}
      sex={child.sex === null ? 'Not recorded' : SEX_WORDS[child.sex]}
      weight={
        weight === null || weight === 'covered'
          ? weight
          : { text: kgWords(weight.kg), how: how(weight.at, weight.method) }
      }
      allergies={child.allergies}
      flags={child.flags.map((flag) => FLAG_WORDS[flag].label)}
      below={below}
    >
      {children}
    </IdentityStrip>
  );
}
