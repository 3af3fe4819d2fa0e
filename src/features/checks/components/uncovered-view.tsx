import { useEffect, useLayoutEffect, useRef, useState, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { CoverPanel } from '@/components/covered/cover-panel';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button, buttonClass } from '@/components/ui/button';
import { GlyphWord, StateWord } from '@/components/ui/state-word';
import type { Comparison } from '@shared/checks/form';
import type { CheckPage } from '@shared/routes/checks';
import { isDisputed } from '@shared/orders/states';
import { verdictOf, type CheckSource } from '../api/check-source';
import { headline, ledeOf } from '../forms/compare-words';
import { dayTime } from '../forms/chart-words';
import { CompareTable } from './compare-table';
import type { EndedBy } from './covered-view';
import { FootPanel } from './foot-panel';
import { GaugePair } from './gauge-pair';
import { SignBar, SignSection, useSigning } from './sign-section';
import { SlipPanel } from './slip-panel';

type UncoveredViewProps = {
  source: CheckSource;
  page: CheckPage;
  /** The cover goes now, in front of the one who locked in. */
  lifts: boolean;
  onEnded: (how: EndedBy) => void;
};

/** The cover lies over both sets for a moment and goes by a wipe; on a later visit there is none. */
function Uncovering({ lifts, children }: { lifts: boolean; children: ReactNode }) {
  const [isLifted, setLifted] = useState(!lifts);
  useLayoutEffect(() => setLifted(true), []);
  return <CoverPanel isLifted={isLifted}>{children}</CoverPanel>;
}

type OutcomeProps = { comparison: Comparison; takesFocus: boolean };

/** The page's first words; it exists only once the cover is off, and then takes the focus. */
function Outcome({ comparison, takesFocus }: OutcomeProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    if (takesFocus) heading.current?.focus();
  }, [takesFocus]);
  return (
    <h1 id="outcome" ref={heading} tabIndex={-1} className="outline-none">
      {headline(comparison)}
    </h1>
  );
}

function WhoSettles() {
  return (
    <section className="sec">
      <h2>
        Who settles it
        <span>neither of you alone</span>
      </h2>
      <div className="mt-s2 grid gap-s2">
        <p>
          <b>The prescriber works it out again, alone,</b> and makes a new version, which somebody checks from
          the beginning.
        </p>
        <p>
          <b>Or a senior or a pharmacist settles it,</b> who is neither the prescriber nor you; it then goes
          back to the prescriber. The prescriber can never overrule a checker.
        </p>
      </div>
    </section>
  );
}

type FootProps = { source: CheckSource; page: CheckPage; onSlip: () => void };

/** Nothing to sign: disputed, signed already, or passed on. */
function RestingBar({ source, page, onSlip }: FootProps) {
  const slip = verdictOf(page, 'slip');
  const differs = isDisputed(page.state);
  return (
    <BottomBar
      state={
        differs ? (
          <GlyphWord glyph="caution" tone="ochre">
            Does not agree
          </GlyphWord>
        ) : (
          <StateWord state={page.state} />
        )
      }
      say={
        differs ? (
          <>
            <b>Neither set counts until both agree.</b> The program does not say who is right.
          </>
        ) : (
          <>
            <b>Your figures are locked in.</b> {verdictOf(page, 'sign-check').words}
          </>
        )
      }
    >
      {source.via === 'own' && (
        <>
          {differs && slip.allowed && (
            <Button kind="quiet" onClick={onSlip}>
              I made a slip: pass the check on
            </Button>
          )}
          <Link className={buttonClass()} to={`/orders/${page.order.versionId}`}>
            Go to the order
          </Link>
          <Link className={buttonClass('primary')} to="/checks">
            Back to my checks
          </Link>
        </>
      )}
    </BottomBar>
  );
}

/** After lock-in: both sets, frozen, side by side; then sign, accept, return, or leave it to who settles. */
export function UncoveredView({ source, page, lifts, onEnded }: UncoveredViewProps) {
  const [isSlipOpen, setSlipOpen] = useState(false);
  const signing = useSigning(source, page, onEnded);
  const { uncovered, zone } = page;
  if (uncovered === null) return null;
  const { comparison, author, checkerName, lockedInAt } = uncovered;
  const canSign = verdictOf(page, 'sign-check').allowed && comparison.outcome !== 'facts-differ';
  return (
    <>
      <main id="main" className="grid" tabIndex={-1}>
        <Uncovering lifts={lifts}>
          <div className="mm">
            <section className="l" aria-labelledby="outcome">
              <Outcome comparison={comparison} takesFocus={lifts} />
              <p className="lede">{ledeOf(comparison)}</p>
              <CompareTable
                comparison={comparison}
                author={{
                  name: author.name,
                  note: `${author.title}, signed ${dayTime(page.order.signedAt, zone)}`,
                }}
                checker={{ name: `You, ${checkerName}`, note: `locked in ${dayTime(lockedInAt, zone)}` }}
              />
            </section>
            <section className="rgt" aria-label="Drawn, and what comes next">
              <GaugePair page={page} isLow={canSign} />
              {comparison.effect && (
                <section className="sec">
                  <h2>What the difference comes to</h2>
                  <p className="mt-s2">{comparison.effect}</p>
                </section>
              )}
              {canSign && <SignSection signing={signing} isOwn={source.via === 'own'} />}
              {isDisputed(page.state) && <WhoSettles />}
            </section>
          </div>
        </Uncovering>
      </main>
      {isSlipOpen && source.via === 'own' && (
        <FootPanel>
          {' '}
          <SlipPanel
            versionId={source.versionId}
            onClose={() => setSlipOpen(false)}
            onDone={() => onEnded('slip')}
          />
        </FootPanel>
      )}
      {canSign && <SignBar {...{ source, page, signing }} />}
      {!canSign && !isSlipOpen && <RestingBar {...{ source, page }} onSlip={() => setSlipOpen(true)} />}
    </>
  );
}
