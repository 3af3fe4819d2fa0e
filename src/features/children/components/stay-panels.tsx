import { useMutation } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { Button } from '@/components/ui/button';
import { DateTimeField } from '@/components/ui/date-time-field';
import { Row } from '@/components/ui/group';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Notice } from '@/components/ui/notice';
import { NumberField } from '@/components/ui/number-field';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { TextField } from '@/components/ui/text-field';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { call } from '@/lib/api';
import { serverNow } from '@/lib/server-clock';
import { newKey, ProblemError } from '@/lib/server-answer';
import { FRACTIONS, type Fraction } from '@shared/calc/types';
import { FRACTION_WORDS } from '@shared/orders/words';
import type { ChildHead } from '@shared/routes/children';
import { localDateTime } from '@shared/time';
import { refreshChild } from '../api/use-chart';

/** One act on the child: a fresh key after each answer, the page read again, the panel closed. */
function useAct(childId: string, act: (key: string) => Promise<unknown>, onClose: () => void) {
  const key = useRef(newKey());
  return useMutation({
    mutationFn: () => act(key.current),
    onSuccess: async () => {
      await refreshChild(childId);
      onClose();
    },
    onSettled: () => {
      key.current = newKey();
    },
  });
}

const fieldError = (error: unknown, field: string): string | undefined =>
  error instanceof ProblemError
    ? error.problem.errors?.find(({ pointer }) => pointer === `/${field}`)?.detail
    : undefined;

const Failure = ({ error }: { error: Error | null }) =>
  error && (
    <Notice kind="stop" title="Not recorded." live>
      {error.message}
    </Notice>
  );

export function IntakePanel({ childId, onClose }: { childId: string; onClose: () => void }) {
  const { zone } = useKnownMe().hospital;
  const [ml, setMl] = useState('');
  const [at, setAt] = useState(() => localDateTime(serverNow(), zone));
  const [where, setWhere] = useState('');
  const record = useAct(
    childId,
    (key) => call('recordIntake', { params: { id: childId }, key, body: { what: 'bolus', ml, at, where } }),
    onClose,
  );
  return (
    <InlinePanel
      title="A bolus given elsewhere"
      onClose={onClose}
      closeLabel="Close without recording"
      actions={
        <Button
          kind="primary"
          busy={record.isPending}
          busyLabel="Recording, please wait"
          onClick={() => record.mutate()}
        >
          Record this bolus
        </Button>
      }
    >
      <Failure error={record.error} />
      <Row>
        <NumberField
          label="Volume"
          unit="mL"
          width="w"
          value={ml}
          error={fieldError(record.error, 'ml')}
          onChange={(event) => setMl(event.target.value)}
        />
        <DateTimeField
          label="When"
          width="w2"
          value={at}
          error={fieldError(record.error, 'at')}
          onChange={(event) => setAt(event.target.value)}
        />
        <TextField
          label="Where, and what fluid"
          width="w3"
          value={where}
          error={fieldError(record.error, 'where')}
          onChange={(event) => setWhere(event.target.value)}
        />
      </Row>
    </InlinePanel>
  );
}

const PLAN_KINDS = [
  { value: 'fraction', label: 'A fraction of maintenance' },
  { value: 'allowance', label: 'A total allowance' },
  { value: 'none', label: 'No plan' },
];

export function PlanPanel({
  childId,
  hasPlan,
  onClose,
}: {
  childId: string;
  hasPlan: boolean;
  onClose: () => void;
}) {
  const [kind, setKind] = useState('fraction');
  const [fraction, setFraction] = useState<Fraction | ''>('');
  const [mlPer24h, setMl] = useState('');
  const [reason, setReason] = useState('');
  const set = useAct(
    childId,
    (key) =>
      call('setFluidPlan', {
        params: { id: childId },
        key,
        body: {
          kind: kind as 'fraction',
          fraction: kind === 'fraction' && fraction !== '' ? fraction : null,
          mlPer24h: kind === 'allowance' ? mlPer24h : null,
          reason,
        },
      }),
    onClose,
  );
  return (
    <InlinePanel
      title="Fluid plan for this child"
      onClose={onClose}
      closeLabel="Close without a change"
      actions={
        <Button
          kind="primary"
          busy={set.isPending}
          busyLabel="Setting, please wait"
          onClick={() => set.mutate()}
        >
          Set this plan
        </Button>
      }
    >
      <Failure error={set.error} />
      <Segmented
        label="Plan"
        options={hasPlan ? PLAN_KINDS : PLAN_KINDS.slice(0, 2)}
        value={kind}
        onChoose={setKind}
      />
      {kind === 'fraction' && (
        <SelectField
          label="Fraction"
          placeholder="Choose"
          value={fraction}
          error={fieldError(set.error, 'fraction')}
          options={FRACTIONS.map((value) => ({ value, label: FRACTION_WORDS[value] }))}
          onChange={(event) => setFraction(event.target.value as Fraction)}
        />
      )}
      {kind === 'allowance' && (
        <NumberField
          label="All fluids together, at most"
          unit="mL / 24 h"
          value={mlPer24h}
          error={fieldError(set.error, 'mlPer24h')}
          onChange={(event) => setMl(event.target.value)}
        />
      )}
      <TextField
        label="Reason"
        value={reason}
        error={fieldError(set.error, 'reason')}
        onChange={(event) => setReason(event.target.value)}
      />
    </InlinePanel>
  );
}

export function TransferPanel({ child, onClose }: { child: ChildHead; onClose: () => void }) {
  const { wards } = useKnownMe();
  const others = wards.filter(({ id }) => id !== child.ward?.id);
  const [wardId, setWardId] = useState('');
  const [bed, setBed] = useState('');
  const move = useAct(
    child.id,
    (key) => call('transferChild', { params: { id: child.id }, key, body: { wardId, bed } }),
    onClose,
  );
  return (
    <InlinePanel
      title="Move to another ward or bed"
      onClose={onClose}
      closeLabel="Close without moving"
      actions={
        <Button
          kind="primary"
          busy={move.isPending}
          busyLabel="Moving, please wait"
          shutReason={wardId === '' ? 'Choose the ward.' : null}
          onClick={() => move.mutate()}
        >
          Move the child
        </Button>
      }
    >
      <Failure error={move.error} />
      <Row>
        <SelectField
          label="Ward"
          placeholder="Choose"
          value={wardId}
          options={[...others, ...wards.filter(({ id }) => id === child.ward?.id)].map(({ id, name }) => ({
            value: id,
            label: name,
          }))}
          onChange={(event) => setWardId(event.target.value)}
        />
        <TextField label="Bed" value={bed} onChange={(event) => setBed(event.target.value)} />
      </Row>
    </InlinePanel>
  );
}

export function DischargePanel({ childId, onClose }: { childId: string; onClose: () => void }) {
  const navigate = useNavigate();
  const discharge = useAct(
    childId,
    (key) => call('dischargeChild', { params: { id: childId }, key, body: {} }),
    () => void navigate('/'),
  );
  return (
    <InlinePanel
      title="Discharge this child"
      tone="ochre"
      onClose={onClose}
      closeLabel="Keep on the ward"
      actions={
        <Button
          busy={discharge.isPending}
          busyLabel="Discharging, please wait"
          onClick={() => discharge.mutate()}
        >
          Discharge from the ward
        </Button>
      }
    >
      <Failure error={discharge.error} />
      <p>The chart stays readable. It is refused while an infusion is connected.</p>
    </InlinePanel>
  );
}
