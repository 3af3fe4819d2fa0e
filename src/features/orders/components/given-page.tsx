import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { useForm, useWatch, type UseFormReturn } from 'react-hook-form';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button, buttonClass } from '@/components/ui/button';
import { Choice } from '@/components/ui/choice';
import { DateTimeField } from '@/components/ui/date-time-field';
import { Group, Row } from '@/components/ui/group';
import { NumberField } from '@/components/ui/number-field';
import { Reading } from '@/components/ui/reading';
import { Segmented } from '@/components/ui/segmented';
import { SelectField } from '@/components/ui/select-field';
import { GlyphWord } from '@/components/ui/state-word';
import { TextField } from '@/components/ui/text-field';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { refreshChild, useChart } from '@/features/children/api/use-chart';
import { ChildStrip } from '@/features/children/components/child-strip';
import { call } from '@/lib/api';
import { putProblem } from '@/lib/put-problem';
import { UnreachableError } from '@/lib/server-answer';
import type { Chart } from '@shared/routes/children';
import { instant, localDateTime, parseInstant } from '@shared/time';
import { problemWords } from '../api/problem-words';
import { useAct } from '../api/use-act';
import { useColleagues } from '../api/use-colleagues';
import { usePassword } from '../api/use-password';
import { useTitle } from '../api/use-title';
import {
  emptyGivenForm,
  GIVEN_FIELDS,
  givenFaults,
  givenReadBack,
  perKgWords,
  routeOf,
  type GivenForm,
} from '../forms/given-form';
import { ROUTE_OPTIONS, weightWords } from '../forms/order-words';
import { PasswordField } from './password-field';
import { ReadBack } from './read-back';
import { Refusal } from './refusal';
import { NotRead } from './not-read';

/** Prescribers of the ward; whoever writes it down may be the one who said so. */
function useWhoSaidSo(wardId: string | undefined) {
  const me = useKnownMe();
  const { data: people = [] } = useColleagues(wardId);
  const self = me.account.roles.includes('prescriber')
    ? [{ value: me.account.id, label: `${me.account.name}, ${me.account.title}` }]
    : [];
  const others = people
    .filter(({ roles }) => roles.includes('prescriber'))
    .map(({ id, name, title }) => ({ value: id, label: `${name}, ${title}` }));
  return [...self, ...others];
}

const useBolusFluids = () =>
  useQuery({
    queryKey: ['shelf'],
    queryFn: ({ signal }) => call('shelf', { background: true, signal }),
    staleTime: 300_000,
    select: ({ products }) =>
      products
        .filter(({ kinds }) => kinds.includes('bolus'))
        .map(({ id, name }) => ({ value: id, label: name })),
  });

function useGiven(chart: Chart) {
  const { zone } = useKnownMe().hospital;
  const navigate = useNavigate();
  const now = localDateTime(parseInstant(chart.now) ?? instant(0), zone);
  const rhf = useForm<GivenForm>({ defaultValues: emptyGivenForm(now) });
  const record = useAct('recordGiven');
  const password = usePassword();
  const [trouble, setTrouble] = useState('');
  const send = async () => {
    setTrouble('');
    rhf.clearErrors();
    const form = rhf.getValues();
    const faults = Object.entries(givenFaults(form));
    faults.forEach(([field, message], index) =>
      rhf.setError(field as keyof GivenForm, { type: 'entry', message }, { shouldFocus: index === 0 }),
    );
    const route = routeOf(form);
    if (faults.length > 0 || route === undefined || !password.isThere()) return;
    const { weightId, readBack: _said, ...entries } = form;
    try {
      const made = await record.mutateAsync({
        params: { id: chart.child.id },
        body: {
          ...entries,
          kind: 'bolus',
          route,
          weightId: weightId || null,
          readBack: true,
          password: password.value,
        },
      });
      await refreshChild(chart.child.id);
      await navigate(`/orders/${made.versionId}`, { replace: true });
    } catch (error) {
      if (password.takes(error)) return;
      const words =
        error instanceof UnreachableError
          ? problemWords(error)
          : putProblem(error, rhf.setError, GIVEN_FIELDS);
      if (words !== null) setTrouble(words);
    }
  };
  return { rhf, password, trouble, isPending: record.isPending, send: () => void send(), zone };
}

type Option = { value: string; label: string };
type PartProps = { rhf: UseFormReturn<GivenForm> };

/** What was wrong with an entry goes as soon as it is typed in: at leaving it, the page would move under a press. */
const entry = (rhf: UseFormReturn<GivenForm>, name: keyof GivenForm) =>
  rhf.register(name, { onChange: () => rhf.clearErrors(name) });

function WhatGiven({
  rhf,
  values,
  fluids,
  kg,
}: PartProps & { values: GivenForm; fluids: Option[]; kg: string | undefined }) {
  const { errors } = rhf.formState;
  const choose = (field: 'route', value: string) => {
    rhf.setValue(field, value);
    rhf.clearErrors(field);
  };
  return (
    <Group head="What">
      <SelectField
        label="Fluid"
        placeholder="Choose the fluid"
        options={fluids}
        error={errors.productId?.message}
        {...entry(rhf, 'productId')}
      />
      <Row>
        <NumberField
          label="Volume"
          unit="mL"
          hint={perKgWords(values.volumeMl, kg)}
          error={errors.volumeMl?.message}
          {...entry(rhf, 'volumeMl')}
        />
        <NumberField
          label="Given over"
          unit="min"
          error={errors.overMinutes?.message}
          {...entry(rhf, 'overMinutes')}
        />
      </Row>
      <Segmented
        label="How"
        options={ROUTE_OPTIONS}
        value={values.route}
        onChoose={(route) => choose('route', route)}
        error={errors.route?.message}
      />
    </Group>
  );
}

function WhenGiven({ rhf, people }: PartProps & { people: Option[] }) {
  const { errors } = rhf.formState;
  return (
    <Group head="When, why">
      <Row>
        <DateTimeField
          label="Given at"
          width="full"
          value={rhf.watch('givenAt')}
          error={errors.givenAt?.message}
          {...entry(rhf, 'givenAt')}
        />
        <SelectField
          label="On whose word"
          width="full"
          placeholder="Name the prescriber"
          options={people}
          error={errors.onWordOfId?.message}
          {...entry(rhf, 'onWordOfId')}
        />
      </Row>
      <TextField label="Why" error={errors.reason?.message} {...entry(rhf, 'reason')} />
    </Group>
  );
}

function Given({ chart }: { chart: Chart }) {
  const { rhf, password, trouble, isPending, send, zone } = useGiven(chart);
  const values = useWatch({ control: rhf.control }) as GivenForm;
  const { errors } = rhf.formState;
  const { data: fluids = [] } = useBolusFluids();
  const people = useWhoSaidSo(chart.child.ward?.id);
  const weight = chart.weights.find(({ id }) => id === (values.weightId || chart.dosingWeightId));
  const labelOf = (options: Option[], value: string) =>
    options.find((option) => option.value === value)?.label;
  const spoken = givenReadBack({
    form: values,
    fluid: labelOf(fluids, values.productId),
    by: labelOf(people, values.onWordOfId),
  });
  return (
    <>
      <ChildStrip child={chart.child} weight={weight ?? null}>
        <Link to={`/children/${chart.child.id}`}>Chart</Link>
      </ChildStrip>
      <main className="page" id="main" tabIndex={-1}>
        <form
          className="max-w-[720px]"
          aria-label="Given in an emergency"
          onSubmit={(event) => event.preventDefault()}
          noValidate
        >
          <div className="ttl">
            <h1>Given in an emergency</h1>
            <GlyphWord glyph="given" tone="ochre">
              A bolus that is already in
            </GlyphWord>
          </div>
          <p className="lead">It is counted at once. A second person countersigns it within the hour.</p>
          {trouble && <Refusal title="It was not written down.">{trouble}</Refusal>}
          <WhatGiven rhf={rhf} values={values} fluids={fluids} kg={weight?.kg} />
          <Group head="Weight" align="label">
            <SelectField
              label="Weight"
              labelHidden
              options={[
                { value: '', label: 'As the chart proposes' },
                ...chart.weights
                  .filter(({ usable }) => usable)
                  .map((row) => ({ value: row.id, label: weightWords(row, zone) })),
              ]}
              error={errors.weightId?.message}
              {...entry(rhf, 'weightId')}
            />
          </Group>
          <WhenGiven rhf={rhf} people={people} />
          <Group head="Read back" align="label">
            {spoken ? (
              <ReadBack text={spoken} />
            ) : (
              <p className="soft pt-[8px]">The sentence to read back appears when the entries are there.</p>
            )}
            <Choice {...entry(rhf, 'readBack')}>I read this back and it was confirmed</Choice>
            {errors.readBack && (
              <p className="err" role="alert">
                {errors.readBack.message}
              </p>
            )}
            <PasswordField value={password.value} onType={password.type} error={password.error} />
          </Group>
        </form>
      </main>
      <BottomBar
        say={
          <>
            <b>Nothing here can be changed afterwards.</b> What was wrong is corrected by a new entry.
          </>
        }
      >
        <Link className={buttonClass()} to={`/children/${chart.child.id}`}>
          Back to the chart
        </Link>
        <Button kind="primary" busy={isPending} busyLabel="Writing down, please wait" onClick={send}>
          Write down what was given
        </Button>
      </BottomBar>
    </>
  );
}

/** The short form for a bolus that could not wait for an order. */
export function GivenPage() {
  const { childId = '' } = useParams();
  useTitle('Given in an emergency');
  const { data: chart, error, refetch } = useChart(childId);
  if (chart) return <Given key={chart.child.id} chart={chart} />;
  return (
    <main className="page" id="main" tabIndex={-1}>
      {error ? (
        <NotRead title="The chart could not be read" error={error} onAgain={() => void refetch()} />
      ) : (
        <Reading what="the chart" />
      )}
    </main>
  );
}
