import { CautionList, type CautionEntry } from '@/components/workings/caution-list';
import type { OrderContent } from '@shared/orders/content';
import type { OrderView } from '@shared/routes/orders';
import { dayTime } from '../forms/order-words';
import { exceptionWords } from './before-signing';

type Limit = OrderContent['limits'][number];

const entryOf = ({ strength, met, title, text, reason, source }: Limit): CautionEntry => ({
  strength: met && strength !== 'information' ? 'met' : strength,
  title: `${title}.`,
  text: (
    <>
      {text} {reason && <b>Reason: {reason}</b>} <span className="tag">{source}</span>
    </>
  ),
});

/** The limits that were in force, what they said, and the reasons given. */
export function LimitsApplied({ limits }: Pick<OrderContent, 'limits'>) {
  const broken = limits.filter(({ met }) => !met);
  const kept = limits.filter(({ met, strength }) => met && strength !== 'information');
  return (
    <section className="sec">
      <h2>
        Limits applied
        <span>
          {broken.length} raised, {kept.length} met
        </span>
      </h2>
      <CautionList entries={[...broken, ...kept].map(entryOf)} />
    </section>
  );
}

/** What seniors agreed to or refused, and what is still to be countersigned. */
export function ExceptionList({
  exceptions,
  zone,
}: {
  exceptions: NonNullable<OrderView['open']>['exceptions'];
  zone: string;
}) {
  if (exceptions.length === 0) return null;
  return (
    <section className="sec">
      <h2>Exceptions</h2>
      <CautionList
        entries={exceptions.map((exception) => ({
          strength: 'senior' as const,
          title: `${exception.title}.`,
          text: (
            <>
              {exceptionWords(exception)} {exception.reason}
              {exception.countersignedAt !== null &&
                ` Countersigned ${dayTime(exception.countersignedAt, zone)}.`}
              {exception.countersignedAt === null && exception.countersignDueAt !== null && (
                <b> Countersignature due by {dayTime(exception.countersignDueAt, zone)}.</b>
              )}
            </>
          ),
        }))}
      />
    </section>
  );
}
