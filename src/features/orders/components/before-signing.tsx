import type { CautionEntry } from '@/components/workings/caution-list';
import { CautionList } from '@/components/workings/caution-list';
import type { LimitFinding } from '@shared/calc/types';
import type { WorkedOutDraft } from '@shared/orders/work-out-draft';
import type { Exception } from '../api/use-draft';

const EXCEPTION_WORDS: Readonly<Record<Exception['state'], string>> = {
  asked: 'A senior has been asked.',
  granted: 'Agreed',
  refused: 'Refused',
  void: 'The agreement is void: the draft changed after it.',
};

/** How an exception stands, in words: who agreed, by which way, or that someone was asked. */
export function exceptionWords({ state, by, how }: Exception): string {
  const who = by === null ? '' : ` by ${by}`;
  const way = how === 'telephone' ? ', by telephone' : '';
  return state === 'asked' || state === 'void'
    ? EXCEPTION_WORDS[state]
    : `${EXCEPTION_WORDS[state]}${who}${way}.`;
}

const latestFor = (exceptions: readonly Exception[], code: string): Exception | undefined =>
  exceptions.filter(({ limitCode }) => limitCode === code).at(-1);

const isGranted = (exception: Exception | undefined): boolean =>
  exception !== undefined && EXCEPTION_WORDS[exception.state] === EXCEPTION_WORDS.granted;

/** Every one of these matters has been put to a senior who has not answered yet. */
export const areAsked = (limits: readonly LimitFinding[], exceptions: readonly Exception[]): boolean =>
  limits.length > 0 &&
  limits.every(({ code }) => {
    const latest = latestFor(exceptions, code);
    return latest !== undefined && EXCEPTION_WORDS[latest.state] === EXCEPTION_WORDS.asked;
  });

/** Senior matters that no senior has agreed to yet. */
export const openSeniors = (work: WorkedOutDraft, exceptions: readonly Exception[]): LimitFinding[] =>
  work.seniors.filter(({ code }) => !isGranted(latestFor(exceptions, code)));

const sentence = (title: string): string => `${title}.`;

function seniorEntry(limit: LimitFinding, exceptions: readonly Exception[]): CautionEntry {
  const exception = latestFor(exceptions, limit.code);
  const standing =
    exception === undefined ? 'A senior has to agree before you sign.' : exceptionWords(exception);
  return {
    strength: isGranted(exception) ? 'met' : 'senior',
    title: sentence(limit.title),
    text: `${limit.text} ${standing}`,
  };
}

function entriesOf(work: WorkedOutDraft, exceptions: readonly Exception[]): CautionEntry[] {
  const owed = new Set(work.reasonsOwed.map(({ code }) => code));
  return [
    ...work.seniors.map((limit) => seniorEntry(limit, exceptions)),
    ...work.deferred.map(({ title, text }) => ({
      strength: 'senior' as const,
      title: sentence(title),
      text: `${text} Agreed afterwards, within 1 h: it delays nothing.`,
    })),
    ...work.cautions.map(({ code, title, text }) => ({
      strength: 'caution' as const,
      title: sentence(title),
      text: owed.has(code) ? `${text} A reason is owed.` : text,
    })),
  ];
}

const counted = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

/** What the rules say to this order before it is signed: few cautions in view, what was kept folded away. */
export function BeforeSigning({
  work,
  exceptions,
}: {
  work: WorkedOutDraft;
  exceptions: readonly Exception[];
}) {
  const raised = entriesOf(work, exceptions);
  const kept = work.information.filter(({ strength }) => strength !== 'information');
  const told = work.information.filter(({ strength }) => strength === 'information');
  return (
    <section className="sec">
      <h2>
        Before you sign
        <span>
          {counted(raised.length, 'caution', 'cautions')}, {kept.length} met
        </span>
      </h2>
      <CautionList
        entries={[
          ...raised,
          ...told.map(({ title, text }) => ({
            strength: 'information' as const,
            title: sentence(title),
            text,
          })),
        ]}
      />
      {kept.length > 0 && (
        <details className="text-small">
          <summary className="min-h-[24px] cursor-pointer py-[5px] text-ink-soft">
            {counted(kept.length, 'limit', 'limits')} looked at and kept
          </summary>
          <CautionList
            entries={kept.map(({ title, text }) => ({
              strength: 'met' as const,
              title: sentence(title),
              text,
            }))}
          />
        </details>
      )}
    </section>
  );
}
