import { useCallback, useEffect, useRef, useState } from 'react';
import { useForm } from 'react-hook-form';
import { Link, useNavigate } from 'react-router-dom';
import { Notice } from '@/components/ui/notice';
import { ChildStrip } from '@/features/children/components/child-strip';
import { call } from '@/lib/api';
import { queryClient } from '@/lib/query-client';
import type { OrderForm, OrderFormField } from '@shared/orders/form';
import type { Draft, DraftContext } from '@shared/routes/orders';
import type { DraftSaver } from '../api/draft-saver';
import { problemWords } from '../api/problem-words';
import type { SeniorMatter } from '../api/senior-matter';
import { useChangeKind } from '../api/use-change-kind';
import { useExceptions } from '../api/use-draft';
import { useLeaveGuard, useSaver } from '../api/use-saver';
import { offeredEntries, type Offer } from '../forms/apply-offer';
import { DraftFormProvider, type DraftForm } from '../forms/draft-form';
import { focusField } from '../forms/order-words';
import { useDraftFormValue } from '../forms/use-draft-form';
import { areAsked, openSeniors } from './before-signing';
import { DiscardPanel } from './discard-panel';
import { DraftBar } from './draft-bar';
import { DraftFormPage } from './draft-form-page';
import { DraftResults } from './draft-results';
import { ExceptionPanel } from './exception-panel';
import { LeavePanel } from './leave-panel';
import { MovedPanel } from './moved-panel';
import { SignPanel } from './sign-panel';

type Panel = 'none' | 'sign' | 'exception' | 'discard';

/** The draft as read when the page opened, its chart as last read, and the exceptions as polled. */
function useChartOf(draft: Draft) {
  const [context, setContext] = useState<DraftContext>(draft.context);
  const { data: exceptions, refetch } = useExceptions(draft);
  const read = useCallback(
    async (saver: DraftSaver) => {
      const latest = await call('draft', { params: { id: draft.versionId } });
      queryClient.setQueryData(['draft-exceptions', draft.versionId], latest.exceptions);
      setContext(latest.context);
      if (latest.rev !== saver.rev) saver.meet(latest);
    },
    [draft.versionId],
  );
  return { context, exceptions, read, rereadExceptions: refetch };
}

/** Empty entries speak up; the first of them takes the focus. */
const focusFirstFault = ({ work }: DraftForm): void => {
  if ('missing' in work) focusField(Object.keys(work.fields)[0] as OrderFormField);
  else if ('workOut' in work) {
    const [owed] = work.reasonsOwed;
    if (owed?.owes) focusField(owed.owes);
    else if (owed) document.getElementById(`order-reason-${owed.code}`)?.focus();
  }
};

type PanelsProps = {
  open: Panel;
  draft: Draft;
  form: DraftForm;
  saver: DraftSaver;
  matters: readonly SeniorMatter[];
  onSeniorNeeded: (matters: SeniorMatter[]) => void;
  onRefresh: () => Promise<void>;
  onDiscarded: () => void;
  onClose: () => void;
};

function Panels({ open, draft, form, matters, onDiscarded, onSeniorNeeded, ...shared }: PanelsProps) {
  const { work } = form;
  if (open === 'discard') return <DiscardPanel draft={draft} onDone={onDiscarded} onClose={shared.onClose} />;
  if (!('workOut' in work) || work.brims.length > 0) return null;
  if (open === 'sign') {
    return <SignPanel draft={draft} {...shared} work={work} onSeniorNeeded={onSeniorNeeded} />;
  }
  if (open !== 'exception') return null;
  return <ExceptionPanel draft={draft} {...shared} limits={matters} readBack={work.workOut.readBack} />;
}

/** A panel about signing needs figures that may be signed. */
const isShown = (panel: Panel, { work }: DraftForm): boolean =>
  panel === 'discard' || (panel !== 'none' && 'workOut' in work && work.brims.length === 0);

/** The open notebook: the form on the left, what it works out to on the right, the acts at the foot. */
export function DraftBook({ draft }: { draft: Draft }) {
  const navigate = useNavigate();
  const rhf = useForm<OrderForm>({ defaultValues: draft.form, mode: 'onBlur' });
  const { context, exceptions, read, rereadExceptions } = useChartOf(draft);
  const [isAsked, setAsked] = useState(false);
  const [panel, setPanel] = useState<Panel>('none');
  const [isVoided, setVoided] = useState(false);
  const [unseen, setUnseen] = useState<SeniorMatter[]>([]);
  const isDone = useRef(false);
  const base = useDraftFormValue(rhf, context, isAsked);
  const { saver, status } = useSaver(draft, base.values);
  const guard = useLeaveGuard(saver, () => isDone.current);
  const changeKind = useChangeKind(draft, saver, () => rhf.getValues());
  const form: DraftForm = {
    ...base,
    ...(draft.version === 1 && {
      changeKind: {
        choose: (kind) => changeKind.mutate(kind),
        isChanging: changeKind.isPending,
        error: changeKind.error ? `Nothing was changed. ${problemWords(changeKind.error)}` : undefined,
      },
    }),
  };
  const { work, values } = form;
  const seniors = 'workOut' in work ? openSeniors(work, exceptions) : [];

  useEffect(() => {
    saver.onSaved = ({ exceptionsVoided }) => {
      if (!exceptionsVoided) return;
      setVoided(true);
      void rereadExceptions();
    };
  }, [saver, rereadExceptions]);

  const take = (offer: Offer) => {
    const entries = offeredEntries(offer);
    if (entries) form.set(entries);
  };
  const settle = (chosen: OrderForm) => {
    if (status.theirs) saver.settle(status.theirs, chosen);
    rhf.reset(chosen);
  };
  const keep = async () => {
    if (await saver.flush()) await navigate(`/children/${context.child.id}`);
  };
  const close = () => setPanel('none');
  const weight =
    context.weights.find(({ id }) => id === values.weightId) ?? context.weights.find(({ usable }) => usable);

  return (
    <DraftFormProvider value={form}>
      <ChildStrip child={context.child} weight={weight ?? null}>
        <Link to={`/children/${context.child.id}`}>Chart</Link>
      </ChildStrip>
      <main className="book" id="main" tabIndex={-1}>
        <DraftFormPage draft={draft} isAsked={isAsked} />
        <DraftResults exceptions={exceptions} onOffer={take} />
      </main>
      {isVoided && seniors.length > 0 && (
        <Notice kind="caution" title="The draft changed after a senior agreed." live>
          The agreement was for the figures before: ask again.
        </Notice>
      )}
      {status.theirs ? (
        <MovedPanel mine={values} theirs={status.theirs} onSettle={settle} />
      ) : guard.isAsking ? (
        <LeavePanel words={status.words} onStay={guard.stay} onLeave={guard.leave} />
      ) : (
        <Panels
          open={panel}
          draft={draft}
          form={form}
          saver={saver}
          matters={seniors.length > 0 ? seniors : unseen}
          onSeniorNeeded={(matters) => {
            setUnseen(matters);
            setPanel('exception');
          }}
          onRefresh={() => read(saver)}
          onDiscarded={() => {
            isDone.current = true;
          }}
          onClose={close}
        />
      )}
      <DraftBar
        work={work}
        seniors={seniors}
        isSeniorAsked={areAsked(seniors, exceptions)}
        status={status}
        zone={context.zone}
        isPanelOpen={isShown(panel, form) || status.theirs !== null || guard.isAsking}
        onDiscard={() => setPanel('discard')}
        onKeep={() => void keep()}
        onSign={() => setPanel('sign')}
        onAskSenior={() => setPanel('exception')}
        onOffer={take}
        onMissing={() => {
          setAsked(true);
          focusFirstFault(form);
        }}
      />
    </DraftFormProvider>
  );
}
