import { useQuery } from '@tanstack/react-query';
import { call, type Answer } from '@/lib/api';
import { POLL_MS, queryClient } from '@/lib/query-client';
import { useAct } from '@/features/orders/api/use-act';
import type { CheckForm } from '@shared/checks/form';
import type { CheckPage } from '@shared/routes/checks';

/** A check at one's own screen, or beside the author on theirs: the same page by two sets of routes. */
export type CheckSource = { via: 'own'; versionId: string } | { via: 'beside' };

export const checkKey = (source: CheckSource) =>
  source.via === 'own' ? ['check', source.versionId] : ['check', 'beside'];

/** Saves that a page started while it was left; a page that opens the same check again waits for them. */
const leaving = new Map<string, Promise<unknown>>();
const nameOf = (source: CheckSource): string => checkKey(source).join(' ');

export function noteLeaving(source: CheckSource, saving: Promise<unknown>): void {
  const name = nameOf(source);
  leaving.set(name, saving);
  void saving.finally(() => {
    if (leaving.get(name) === saving) leaving.delete(name);
  });
}

/** The check page, read again in the background; what is typed lives in the form and is never overwritten by it. */
export const useCheckPage = (source: CheckSource) =>
  useQuery({
    queryKey: checkKey(source),
    queryFn: async ({ signal }): Promise<Answer<'besidePage'>> => {
      await leaving.get(nameOf(source));
      const asked = { background: true, signal };
      return source.via === 'own'
        ? call('checkPage', { ...asked, params: { id: source.versionId } })
        : call('besidePage', asked);
    },
    refetchInterval: POLL_MS,
    gcTime: 0,
  });

/** The uncovered page that a lock-in answers with; `lifts` is true for the one page that saw the cover go. */
export function showPage(source: CheckSource, page: CheckPage): void {
  queryClient.setQueryData(checkKey(source), (before: Answer<'besidePage'> | undefined) => ({
    ...page,
    visit: before?.visit,
  }));
}

/** After an act: the page and every list that counts it. */
export async function rereadCheck(source: CheckSource): Promise<void> {
  await queryClient.invalidateQueries({ queryKey: checkKey(source) });
  const lists = ['checks', 'ward', 'order', 'chart'];
  void queryClient.invalidateQueries({ predicate: ({ queryKey }) => lists.includes(String(queryKey[0])) });
}

export const saveFigures = (
  source: CheckSource,
  body: { rev: number; form: CheckForm },
  key: string,
): Promise<Answer<'saveCheck'>> =>
  source.via === 'own'
    ? call('saveCheck', { params: { id: source.versionId }, body, key })
    : call('besideSave', { body, key });

/** Locking in and signing, each repeated with its own key after a silence. */
export function useCheckActs(source: CheckSource) {
  const own = { lockIn: useAct('lockIn'), sign: useAct('signCheck') };
  const beside = { lockIn: useAct('besideLockIn'), sign: useAct('besideSign') };
  const isOwn = source.via === 'own';
  const acts = isOwn ? own : beside;
  return {
    isLocking: acts.lockIn.isPending,
    isSigning: acts.sign.isPending,
    lockIn: (form: CheckForm): Promise<CheckPage> =>
      isOwn
        ? own.lockIn.mutateAsync({ params: { id: source.versionId }, body: { form } })
        : beside.lockIn.mutateAsync({ body: { form } }),
    sign: (body: { contentSha256: string; acceptReason: string | null; password: string }) =>
      isOwn
        ? own.sign.mutateAsync({ params: { id: source.versionId }, body })
        : beside.sign.mutateAsync({ body }),
  };
}

/** One verdict of the page: whether an act is open to this person now, and if not, why. */
export function verdictOf(page: Pick<CheckPage, 'acts'>, act: CheckPage['acts'][number]['act']) {
  return page.acts.find((verdict) => verdict.act === act) ?? { act, allowed: false, words: '' };
}
