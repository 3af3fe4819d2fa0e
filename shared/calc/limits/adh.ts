import { above, below, formatNumber } from '../../rounding';
import type { MaintenanceFacts, MaintenanceLimit } from '../facts';
import { broken, kept } from '../findings';
import { shareOf } from '../intake';

/** The share of full maintenance the child gets with counted intake, %. */
const percentGiven = ({ order, differs, totalMl, fullMl }: MaintenanceFacts): number =>
  differs ? (totalMl / fullMl) * 100 : shareOf(order.fraction) * 100;

const reasonIsOwed = ({ order }: MaintenanceFacts) =>
  order.fractionReason?.trim() ? {} : { reasonOwed: true, owes: 'fractionReason' as const };

/** With the raised-ADH flag 50 to 80% is usual, anything else a caution with a reason; NICE NG29 1.4. */
export const raisedAdhLimit: MaintenanceLimit = (facts, found) => {
  const { scene } = facts;
  if (!scene.request.child.flags.includes('raised-adh')) return;
  const { raisedAdhLow, raisedAdhHigh } = scene.rules.fraction;
  const source = scene.sources.fraction.raisedAdhLow;
  const percent = percentGiven(facts);
  const usual = `${raisedAdhLow} to ${raisedAdhHigh}% is usual`;
  const more = { value: percent, limit: raisedAdhHigh, unit: '%' };
  const title = `Raised ADH risk at ${formatNumber(percent, 1)}%`;
  if (below(percent, raisedAdhLow) || above(percent, raisedAdhHigh)) {
    const text = `${usual} while ADH may be raised. Your reason is printed with the order.`;
    found.push(broken('adh-fraction', 'caution', [title, text], source, { ...more, ...reasonIsOwed(facts) }));
  } else {
    found.push(kept('adh-fraction', 'caution', [title, `${usual} while ADH may be raised.`], source, more));
  }
};

/** Heart, kidney or liver trouble: the amount is asked for, never full by default; common practice. */
export const restrictedLimit: MaintenanceLimit = (facts, found) => {
  const { request, sources } = facts.scene;
  const { flags } = request.child;
  const isRestricted = flags.includes('cardiac') || flags.includes('renal') || flags.includes('hepatic');
  if (!isRestricted || request.plan || below(percentGiven(facts), 100)) return;
  const text =
    'Heart, kidney or liver disease: full maintenance needs your reason, or a total allowance on the chart.';
  found.push(
    broken(
      'full-with-restriction',
      'caution',
      ['Full maintenance', text],
      sources.maintenance.allFluidsPercent,
      reasonIsOwed(facts),
    ),
  );
};
