import { canonicalText } from '@shared/canonical';
import type { Kind } from '@shared/calc/types';
import type { VersionState } from '@shared/orders/states';
import { HOUR, instant, type Instant } from '@shared/time';
import { kilograms, millilitres, millilitresPerHour } from '@shared/units';
import { eq } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import { orders, orderVersions } from '../../../server/db/schema/orders';
import { weights } from '../../../server/db/schema/weights';
import type { PersonKey, World } from './world';

/** What a list reads of content: a planted order has no more. The figures are found nowhere else. */
const contentOf = (kind: Kind) => ({
  schema: 1,
  inputs:
    kind === 'maintenance'
      ? {
          kind,
          method: 'bands-daily',
          fraction: 'two-thirds',
          fractionReason: null,
          temperatureC: null,
          newbornMlPerKgPerDay: null,
          feedsMl: '0.0',
          feedsNote: '',
          drugsMl: '0.0',
          drugsNote: '',
          typedRate: null,
          hours: '24.0',
        }
      : {
          kind,
          doseBy: 'weight',
          mlPerKg: '10.0',
          volumeMl: null,
          overMinutes: '15',
          route: 'pump',
          advisedBy: null,
        },
  figures:
    kind === 'maintenance'
      ? {
          rateMlPerH: '43.7',
          volumeMl: '1049.0',
          hours: '24.0',
          overMinutes: null,
          mlPerKg: null,
          perHourExact: '43.7',
          fullMl: '1320.0',
        }
      : {
          rateMlPerH: null,
          volumeMl: '163.7',
          hours: null,
          overMinutes: '15',
          mlPerKg: '10.0',
          perHourExact: null,
          fullMl: null,
        },
  fluid: {
    id: 'planted',
    name: 'Planted fluid 0.77 %',
    base: 'Planted fluid 0.77 %',
    addedPotassium: '0.00',
    sodium: '131.00',
    potassium: '0.00',
    chloride: '131.00',
    calcium: '0.00',
    magnesium: '0.00',
    lactate: '0.00',
    acetate: '0.00',
    gluconate: '0.00',
    glucoseGPerL: '0.00',
    osmolarity: '262.00',
    readyMixed: true,
    highRisk: false,
  },
  gauge: {
    orderMl: '1049.0',
    brimMl: '2000.0',
    brimNote: 'in 24 h',
    bands: [
      { label: 'first 10 kg', ml: '1000.0', fullMl: '1000.0' },
      { label: 'next 10 kg', ml: '320.0', fullMl: '320.0' },
    ],
    ghosts: [],
  },
  limits: [],
});

export type PlantedVersion = {
  state?: VersionState;
  kind?: Kind;
  author?: PersonKey;
  stateSince?: Instant;
  signedAt?: Instant;
  checkDueAt?: Instant;
  startBy?: Instant;
  lapsesAt?: Instant;
  /** Its checker has signed it: by default in every state that comes after the check. */
  checked?: boolean;
  askedChecker?: PersonKey;
};

const UNCHECKED: readonly VersionState[] = [
  'draft',
  'awaiting-check',
  'disputed',
  'returned',
  'awaiting-pharmacist',
  'withdrawn',
  'revised',
  'discarded',
  'given',
];
const NEVER_SIGNED: readonly VersionState[] = ['draft', 'discarded'];

let codes = 0;

/** An order put straight into a state, for tests of what lists show of it. */
export function plantVersion(world: World, childId: string, change: PlantedVersion = {}) {
  const { state = 'signed', kind = 'maintenance', author = 'doctor' } = change;
  const now = world.clock.now();
  const signedAt = NEVER_SIGNED.includes(state) ? null : (change.signedAt ?? instant(now - HOUR));
  const content = canonicalText(contentOf(kind));
  return world.within(async (tx) => {
    const code = `BL-260610-${String(++codes).padStart(3, '0')}`;
    const authorId = world.people[author].id;
    const [order] = await tx
      .insert(orders)
      .values({ code, childId, kind, madeBy: authorId, madeAt: now })
      .returning();
    const [weight] = await tx.select().from(weights).where(eq(weights.childId, childId)).limit(1);
    const isChecked = change.checked ?? !UNCHECKED.includes(state);
    const [row] = await tx
      .insert(orderVersions)
      .values({
        orderId: order!.id,
        version: 1,
        childId,
        kind,
        state,
        stateSince: change.stateSince ?? instant(now - HOUR / 2),
        authorId,
        reason: 'Cannot drink',
        askedChecker: change.askedChecker && world.people[change.askedChecker].id,
        checkDueAt: change.checkDueAt ?? null,
        signedAt,
        ...(signedAt !== null && {
          content,
          contentSha256: createHash('sha256').update(content, 'utf8').digest('hex'),
          rulebookNumber: 1,
          weightId: weight?.id,
          weightKg: weight?.kg ?? kilograms(16.4),
          rateMlH: kind === 'maintenance' ? millilitresPerHour(43.7) : null,
          volumeMl: kind === 'maintenance' ? millilitres(1049) : millilitres(163.7),
          plannedStart: now,
          startBy: change.startBy ?? instant(now + 6 * HOUR),
          lapsesAt: change.lapsesAt ?? instant(now + 24 * HOUR),
        }),
        checkedAt: isChecked ? instant(now - HOUR / 2) : null,
        givenAt: state === 'given' || state === 'countersigned' ? instant(now - HOUR) : null,
      })
      .returning({ id: orderVersions.id });
    return { orderId: order!.id, versionId: row!.id, code };
  });
}
