import { hasRole } from '@shared/accounts/actor';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { TRANSITIONS, type Act } from '@shared/orders/transitions';
import type { OrderView } from '@shared/routes/orders';

export type Standing = 'open' | 'absent' | { shut: string };

/**
 * How an act stands for the reader: open; shut with its reason, where role and state would fit; or not theirs at all.
 */
export function useOrderActs(view: OrderView): (act: Act) => Standing {
  const me = useKnownMe();
  return (act) => {
    const verdict = view.acts.find((each) => each.act === act);
    if (verdict === undefined) return 'absent';
    if (verdict.allowed) return 'open';
    const { from, roles } = TRANSITIONS[act];
    const mightFit = hasRole(me.account, roles) && from.includes(view.state);
    return mightFit ? { shut: verdict.words } : 'absent';
  };
}
