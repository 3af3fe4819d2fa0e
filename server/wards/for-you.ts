import type { Actor } from '@shared/accounts/actor';
import { isConnected, isGiven, isIn } from '@shared/orders/states';
import type { z } from 'zod';
import type { ROUTES } from '@shared/routes';
import { formatDuration, formatTime, HOUR, instant, type Instant } from '@shared/time';
import type { LoadedLine } from './load-lines';

type Item = z.input<(typeof ROUTES)['ward']['response']>['forYou'][number];

/** What the head of the ward page counts; a covered order is named by its child alone. */
export type WardWork = {
  actor: Actor;
  lines: readonly LoadedLine[];
  /** 'Ekström, Liv' by child id. */
  names: ReadonlyMap<string, string>;
  /** Versions this person could check or countersign now. */
  toCheck: ReadonlySet<string>;
  asked: readonly { versionId: string; childId: string }[];
  toCountersign: readonly { versionId: string; childId: string }[];
  now: Instant;
  zone: string;
};

/** Ours: the ward's head tells of an order that lapses within two hours. */
const LAPSES_SOON = 2 * HOUR;

type Matter = { versionId: string; childId: string; note?: string };
type Sort = { code: Item['code']; one: string; many: string; all: string; single: (id: string) => string };

const SORTS: readonly Sort[] = [
  {
    code: 'checks',
    one: 'order waits for your check',
    many: 'orders wait for your check',
    all: '/checks',
    single: (id) => `/checks/${id}`,
  },
  {
    code: 'countersign',
    one: 'countersignature is owed by you',
    many: 'countersignatures are owed by you',
    all: '/checks',
    single: (id) => `/orders/${id}/countersign`,
  },
  {
    code: 'exceptions',
    one: 'senior matter waits for you',
    many: 'senior matters wait for you',
    all: '/exceptions',
    single: (id) => `/exceptions/${id}`,
  },
  {
    code: 'returned',
    one: 'of your orders came back',
    many: 'of your orders came back',
    all: '',
    single: (id) => `/orders/${id}`,
  },
  {
    code: 'overdue',
    one: 'order is overdue',
    many: 'orders are overdue',
    all: '',
    single: (id) => `/orders/${id}`,
  },
  {
    code: 'over-brim',
    one: 'draft stopped at the brim',
    many: 'drafts stopped at the brim',
    all: '',
    single: (id) => `/drafts/${id}`,
  },
  {
    code: 'lapsing',
    one: 'order lapses within 2 h',
    many: 'orders lapse within 2 h',
    all: '',
    single: (id) => `/orders/${id}`,
  },
];

/** What on this ward asks for this person, the most pressing first; nothing that is not there. */
export function forYou(work: WardWork): Item[] {
  const found = mattersOf(work);
  return SORTS.flatMap((sort) => {
    const matters = found[sort.code];
    const [first] = matters;
    if (first === undefined) return [];
    return [
      {
        code: sort.code,
        count: matters.length,
        words: matters.length === 1 ? sort.one : sort.many,
        detail: matters.map((matter) => detailOf(matter, work.names)).join('; '),
        href: matters.length === 1 || sort.all === '' ? sort.single(first.versionId) : sort.all,
      },
    ];
  });
}

const detailOf = ({ childId, note }: Matter, names: WardWork['names']): string =>
  [names.get(childId) ?? '', note].filter(Boolean).join(', ');

const matterOf = ({ row }: LoadedLine, note?: string): Matter => ({
  versionId: row.versionId,
  childId: row.childId,
  note,
});

function mattersOf({
  lines,
  toCheck,
  asked,
  toCountersign,
  now,
  zone,
}: WardWork): Record<Item['code'], Matter[]> {
  const queued = lines.filter(({ row }) => toCheck.has(row.versionId));
  const overdue = lines.filter(({ line }) => line.isOverdue);
  return {
    checks: queued.filter(({ row }) => !isGiven(row.state)).map((line) => matterOf(line)),
    countersign: [
      ...queued.filter(({ row }) => isGiven(row.state)).map((line) => matterOf(line)),
      ...toCountersign,
    ],
    exceptions: [...asked],
    returned: lines
      .filter(({ row }) => row.viewerIsAuthor && (isIn(row.state, 'returned') || isIn(row.state, 'disputed')))
      .map((line) => matterOf(line)),
    overdue: overdue.map((line) =>
      matterOf(line, line.lapsesAt === null ? undefined : `by ${formatDuration(now - line.lapsesAt)}`),
    ),
    'over-brim': lines
      .filter(({ row, line }) => isIn(row.state, 'draft') && typeof line.open?.overBrimText === 'string')
      .map((line) => matterOf(line, line.line.open?.overBrimText ?? undefined)),
    lapsing: lines.flatMap((line) => {
      const at = endOf(line);
      if (at === null || at < now || at - now > LAPSES_SOON) return [];
      return [matterOf(line, `at ${formatTime(at, zone)}`)];
    }),
  };
}

/** When it lapses: signed and not started, or running. */
function endOf({ row, line, lapsesAt }: LoadedLine): Instant | null {
  if (isConnected(row.state)) return lapsesAt;
  const at = line.nextDue.at;
  return isIn(row.state, 'signed') && at !== null ? instant(Date.parse(at)) : null;
}
