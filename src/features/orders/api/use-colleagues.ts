import { useQuery } from '@tanstack/react-query';
import { call, type Answer } from '@/lib/api';
import { useKnownMe } from '@/features/accounts/api/use-me';

export type Colleague = Answer<'colleagues'>['people'][number];

/** The people of a child's ward, the reader left out. */
export function useColleagues(wardId: string | undefined) {
  const me = useKnownMe();
  return useQuery({
    queryKey: ['colleagues', wardId],
    queryFn: ({ signal }) => call('colleagues', { params: { id: wardId ?? '' }, background: true, signal }),
    enabled: wardId !== undefined,
    staleTime: 60_000,
    select: ({ people }) => people.filter(({ id }) => id !== me.account.id),
  });
}

export const mayCheck = ({ roles, entitlements }: Colleague, isHighRisk: boolean): boolean =>
  roles.includes('pharmacist') ||
  (entitlements.includes('checking') && (!isHighRisk || entitlements.includes('senior')));

export const isSenior = ({ roles, entitlements }: Colleague): boolean =>
  entitlements.includes('senior') && (roles.includes('prescriber') || roles.includes('lead'));

export const isClinicalColleague = ({ roles }: Colleague): boolean =>
  roles.some((role) => role !== 'administrator');

export const colleagueOption = ({ id, name, title }: Colleague) => ({
  value: id,
  label: `${name}, ${title}`,
});
