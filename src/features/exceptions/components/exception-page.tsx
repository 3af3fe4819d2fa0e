import { useState } from 'react';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button } from '@/components/ui/button';
import { StateWord } from '@/components/ui/state-word';
import { CautionList } from '@/components/workings/caution-list';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { ChildStrip } from '@/features/children/components/child-strip';
import { useAct } from '@/features/orders/api/use-act';
import { problemWords } from '@/features/orders/api/problem-words';
import { useTitle } from '@/features/orders/api/use-title';
import { ActPanel } from '@/features/orders/components/act-panel';
import { FigureBlock } from '@/features/orders/components/figure-block';
import { GaugeColumn } from '@/features/orders/components/gauge-column';
import { LimitsApplied } from '@/features/orders/components/limits-applied';
import { OrderFacts } from '@/features/orders/components/order-facts';
import { ReadBack } from '@/features/orders/components/read-back';
import { Refusal } from '@/features/orders/components/refusal';
import { GivesSection, WorkingsSection } from '@/features/orders/components/result-sections';
import { kindTitle } from '@/features/orders/components/draft-form-page';
import { shownFromContent } from '@/features/orders/forms/shown-order';
import type { Answer } from '@/lib/api';
import { queryClient } from '@/lib/query-client';
import { useExceptionsForMe } from '../api/use-exceptions';

type Matter = Answer<'exceptionMatter'>;

/** Before the matter is opened: what opening it means. */
function Unopened({ versionId, onOpen }: { versionId: string; onOpen: (matter: Matter) => void }) {
  const open = useAct('exceptionMatter');
  const { data } = useExceptionsForMe();
  const row = data?.asked.find((each) => each.versionId === versionId);
  const run = async () => {
    try {
      onOpen(await open.mutateAsync({ params: { id: versionId }, body: {} }));
    } catch {
      // told above the button
    }
  };
  return (
    <main className="page" id="main" tabIndex={-1}>
      <div className="blank max-w-[720px]">
        <h1 className="text-form font-bold">{row ? `${row.child}, ${row.code}` : 'A senior has to agree'}</h1>
        {row && <p>{row.limits.join(' · ')}</p>}
        {open.error && <Refusal title="The matter was not opened.">{problemWords(open.error)}</Refusal>}
        <p>
          Opening it shows you the author’s figures and is written down. You can then no longer be the one who
          checks this order.
        </p>
        <Button
          kind="primary"
          glyph="senior"
          busy={open.isPending}
          busyLabel="Opening, please wait"
          onClick={() => void run()}
        >
          Open the matter
        </Button>
      </div>
    </main>
  );
}

type DecisionProps = { matter: Matter; versionId: string; agree: boolean; onClose: () => void };

function Decision({ matter, versionId, agree, onClose }: DecisionProps) {
  const decide = useAct('decideException');
  const navigate = useNavigate();
  return (
    <ActPanel
      title={agree ? 'Agree to this exception' : 'Refuse this exception'}
      tone={agree ? 'tide' : 'ochre'}
      act={agree ? 'Agree, with my password' : 'Refuse, with this reason'}
      busy="Recording, please wait"
      failed="Nothing was decided."
      reason={agree ? 'Why you agree' : 'Why you refuse, and what would be right'}
      withPassword
      send={({ reason, password }) =>
        decide.mutateAsync({
          params: { id: versionId },
          body: { agree, contentSha256: matter.contentSha256, reason, password },
        })
      }
      onDone={() => {
        void queryClient.invalidateQueries({ queryKey: ['exceptions'] });
        void navigate('/exceptions', { replace: true });
      }}
      onClose={onClose}
    >
      <ReadBack text={matter.content.readBack} />
      {agree && <p>Your agreement holds for exactly these figures. Any change makes it void.</p>}
    </ActPanel>
  );
}

function OpenMatter({ matter, versionId }: { matter: Matter; versionId: string }) {
  const { zone } = useKnownMe().hospital;
  const [decision, setDecision] = useState<'none' | 'agree' | 'refuse'>('none');
  const { content, child, author, reason, limits } = matter;
  const shown = shownFromContent(content);
  return (
    <>
      <ChildStrip child={child} weight={content.weight}>
        <Link to={`/children/${child.id}`}>Chart</Link>
      </ChildStrip>
      <main className="book" id="main" tabIndex={-1}>
        <div className="lp">
          <div className="ttl">
            <h1>{kindTitle(content.kind)}</h1>
            <StateWord state="draft" />
            <span className="tag">
              {content.code}, version {content.version}
            </span>
          </div>
          <ReadBack text={content.readBack} />
          <section className="sec">
            <h2>
              What you are asked<span>by {author}</span>
            </h2>
            <CautionList
              entries={limits.map(({ title, limitCode }) => ({
                strength: 'senior' as const,
                title: `${title}.`,
                text: content.limits.find(({ code }) => code === limitCode)?.text,
              }))}
            />
            <p className="mt-s2">
              <b>The author’s reason:</b> {reason}
            </p>
          </section>
          <OrderFacts content={content} zone={zone} />
        </div>
        <section className="rp" aria-label="What the order works out to">
          <GaugeColumn shown={shown} />
          <div className="rcol">
            <FigureBlock shown={shown} />
            <WorkingsSection steps={shown.steps} />
            <GivesSection gives={shown.gives} />
            <LimitsApplied limits={content.limits} />
          </div>
        </section>
      </main>
      {decision !== 'none' && (
        <Decision
          key={decision}
          matter={matter}
          versionId={versionId}
          agree={decision === 'agree'}
          onClose={() => setDecision('none')}
        />
      )}
      <BottomBar
        state={<StateWord state="draft" />}
        say={
          <>
            <b>A senior who is neither author nor checker agrees or refuses.</b> The order still gets its own
            check.
          </>
        }
      >
        {decision === 'none' && (
          <>
            <Button onClick={() => setDecision('refuse')}>Refuse, with a reason</Button>
            <Button kind="primary" glyph="senior" onClick={() => setDecision('agree')}>
              Agree, with a reason
            </Button>
          </>
        )}
      </BottomBar>
    </>
  );
}

/** One senior matter: read-back, figures, the limit passed and the author's reason, then a decision. */
export function ExceptionPage() {
  const { versionId = '' } = useParams();
  useTitle('Senior decision');
  const [matter, setMatter] = useState<Matter | null>(null);
  if (matter === null) return <Unopened versionId={versionId} onOpen={setMatter} />;
  return <OpenMatter matter={matter} versionId={versionId} />;
}
