import { useMutation } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { Link, useNavigate, useParams, useSearchParams } from 'react-router-dom';
import { Button, buttonClass } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Notice } from '@/components/ui/notice';
import { Reading } from '@/components/ui/reading';
import { useActor } from '@/features/accounts/api/use-actor';
import { call } from '@/lib/api';
import { can } from '@shared/orders/can';
import type { Kind } from '@shared/calc/types';
import type { Chart, WeightRow } from '@shared/routes/children';
import { FRACTION_WORDS } from '@shared/orders/words';
import { useChart } from '../api/use-chart';
import { IntakeList, OrderList, ResultList, useMoment, WeightList } from './chart-lists';
import { ChildStrip } from './child-strip';
import { DischargePanel, IntakePanel, PlanPanel, TransferPanel } from './stay-panels';
import { WeightPanel } from './weight-panel';

type Panel = 'intake' | 'plan' | 'transfer' | 'discharge' | null;

function Start({ chart }: { chart: Chart }) {
  const actor = useActor();
  const navigate = useNavigate();
  const draft = useMutation({
    mutationFn: (kind: Kind) =>
      call('startDraft', { params: { id: chart.child.id }, body: { kind, followsOrderId: null } }),
    onSuccess: ({ versionId }) => navigate(`/drafts/${versionId}`),
  });
  const verdict = can(actor, 'start-draft', chart.child.ward?.id);
  const given = can(actor, 'record-given', chart.child.ward?.id);
  const noWeight = chart.dosingWeightId === null ? 'Record a weight that can be used first.' : null;
  return (
    <div className="acts-row">
      {verdict.allowed && (
        <>
          <Button
            kind="primary"
            shutReason={noWeight}
            busy={draft.isPending}
            busyLabel="Opening a draft"
            onClick={() => draft.mutate('maintenance')}
          >
            Draft maintenance fluids
          </Button>
          {!noWeight && (
            <Button busy={draft.isPending} busyLabel="Opening a draft" onClick={() => draft.mutate('bolus')}>
              Draft a bolus
            </Button>
          )}
        </>
      )}
      {given.allowed && (
        <Link className={buttonClass('secondary')} to={`/children/${chart.child.id}/given`}>
          Given in an emergency
        </Link>
      )}
      {draft.error && (
        <Notice kind="stop" title="No draft was opened." live>
          {draft.error.message}
        </Notice>
      )}
    </div>
  );
}

function PlanWords({ plan }: { plan: Chart['plan'] }) {
  const moment = useMoment();
  if (plan === null) return <p className="soft">No fluid plan. Orders follow the method and the flags.</p>;
  const what =
    plan.kind === 'fraction' && plan.fraction
      ? `Maintenance ${FRACTION_WORDS[plan.fraction]}`
      : `At most ${Number(plan.mlPer24h)} mL in 24 h, all fluids`;
  return (
    <p>
      <b>{what}.</b> {plan.reason}{' '}
      <span className="soft">
        {plan.by}, {moment(plan.at)}
      </span>
    </p>
  );
}

function Section({
  title,
  action,
  children,
}: {
  title: string;
  action?: React.ReactNode;
  children: React.ReactNode;
}) {
  return (
    <section className="sec">
      <h2>
        {title}
        {action}
      </h2>
      {children}
    </section>
  );
}

type WeightsProps = { chart: Chart; may: boolean; back: string | null };

/** `?record=weight` opens the form at once: the order form sends people here to weigh first. */
function Weights({ chart, may, back }: WeightsProps) {
  const [params] = useSearchParams();
  const [isOpen, setOpen] = useState(params.get('record') === 'weight');
  const [confirms, setConfirms] = useState<WeightRow | null>(null);
  const navigate = useNavigate();
  const { id } = chart.child;
  const onTaken = (_weightId: string, usable: boolean) => {
    if (usable && isDraftPath(back)) void navigate(back);
  };
  const action = may && (
    <button type="button" className="linkish" onClick={() => setOpen(true)}>
      Record a weight
    </button>
  );
  return (
    <Section title="Weights" action={action}>
      {isOpen && <WeightPanel childId={id} onClose={() => setOpen(false)} onTaken={onTaken} />}
      {confirms && (
        <WeightPanel
          childId={id}
          confirms={{
            id: confirms.id,
            words: `${Number(confirms.kg)} kg was recorded by ${confirms.recordedBy}. Weigh the child afresh.`,
          }}
          onClose={() => setConfirms(null)}
        />
      )}
      <WeightList weights={chart.weights} dosingWeightId={chart.dosingWeightId} onConfirm={setConfirms} />
    </Section>
  );
}

/** Only a way back into this program's own draft page. */
const isDraftPath = (path: string | null): path is string =>
  path !== null && /^\/drafts\/[0-9a-f-]{36}$/.test(path);

function ChartBody({ chart }: { chart: Chart }) {
  const [params] = useSearchParams();
  const [panel, setPanel] = useState<Panel>(null);
  const actor = useActor();
  const { child } = chart;
  const wardId = child.ward?.id;
  const may = (act: Parameters<typeof can>[1]) => can(actor, act, wardId).allowed;
  const close = () => setPanel(null);
  const open = (which: Panel, words: string) => (
    <button type="button" className="linkish" onClick={() => setPanel(which)}>
      {words}
    </button>
  );
  const back = params.get('back');
  return (
    <main className="page chart-page" id="main">
      <Start chart={chart} />
      {isDraftPath(back) && (
        <p>
          <Link to={back}>Back to the draft</Link>
        </p>
      )}
      <Section title="Fluids">
        <OrderList orders={chart.orders} />
      </Section>
      <Weights chart={chart} may={may('record-weight')} back={back} />
      <div className="two-sections">
        <Section title="Fluid plan" action={may('set-fluid-plan') && open('plan', 'Set a plan')}>
          {panel === 'plan' && <PlanPanel childId={child.id} hasPlan={chart.plan !== null} onClose={close} />}
          <PlanWords plan={chart.plan} />
        </Section>
        <Section
          title="Boluses given elsewhere"
          action={may('record-intake') && open('intake', 'Record one')}
        >
          {panel === 'intake' && <IntakePanel childId={child.id} onClose={close} />}
          <IntakeList intakes={chart.intakes} />
        </Section>
        <Section title="Blood results">
          <ResultList results={chart.results} />
        </Section>
        <Section title="Stay" action={may('transfer-child') && open('transfer', 'Move to another ward')}>
          {panel === 'transfer' && <TransferPanel child={child} onClose={close} />}
          {panel === 'discharge' && <DischargePanel childId={child.id} onClose={close} />}
          <p>
            {child.ward ? `${child.ward.name} ward${child.bed ? `, bed ${child.bed}` : ''}` : 'Discharged'}
            {may('discharge-child') && <> · {open('discharge', 'Discharge')}</>}
          </p>
        </Section>
      </div>
    </main>
  );
}

/** Everything of one child that a ward may read. */
export function ChartPage() {
  const { childId = '' } = useParams();
  const actor = useActor();
  const { data, error, refetch } = useChart(childId);
  useEffect(() => {
    document.title = 'Chart · Brimline';
  }, []);
  if (!data)
    return (
      <main className="page" id="main">
        {error ? (
          <ErrorPanel
            title="The chart could not be read"
            action={
              <Button kind="primary" onClick={() => void refetch()}>
                Ask again
              </Button>
            }
          >
            {error.message}
          </ErrorPanel>
        ) : (
          <Reading what="the chart" lines={8} />
        )}
      </main>
    );
  const weight = data.weights.find(({ id }) => id === data.dosingWeightId) ?? null;
  return (
    <>
      <ChildStrip child={data.child} weight={weight}>
        {can(actor, 'edit-child', data.child.ward?.id).allowed && (
          <Link to={`/children/${childId}/edit`}>Correct details</Link>
        )}
      </ChildStrip>
      <ChartBody chart={data} />
    </>
  );
}
