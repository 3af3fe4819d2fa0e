import { send } from '@/lib/server-answer';

/** A full load afterwards: nothing of this person stays in memory. */
export async function signOut(): Promise<void> {
  await send('/api/sign-out', { method: 'POST', body: {} }).catch(() => undefined);
  window.location.assign('/sign-in');
}
