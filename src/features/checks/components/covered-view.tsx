import { useState } from 'react';
import { Link } from 'react-router-dom';
import { CoverPanel } from '@/components/covered/cover-panel';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button, buttonClass } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { StateWord } from '@/components/ui/state-word';
import { useOfflineSince } from '@/lib/use-online';
import type { CheckPage } from '@shared/routes/checks';
import { verdictOf, type CheckSource } from '../api/check-source';
import { checkRows } from '../forms/check-rows';
import { useCheckForm } from '../forms/use-check-form';
import { FootPanel } from './foot-panel';
import { HandOnPanel } from './hand-on-panel';
import { LockInPanel } from './lock-in-panel';
import { MaySee } from './may-see';
import { MovedFigures } from './moved-figures';
import { OwnFigures } from './own-figures';
import { ReturnPanel } from './return-panel';

const SENTENCE =
  'Then both sets open side by side, for you and for the author. Yours can’t be changed after that.';
const OFFLINE = 'The line is down: nothing can be locked in or sent until it is back.';

export type EndedBy = 'handed-on' | 'returned' | 'slip' | 'signed' | 'signed-pharmacist';

type CoveredViewProps = {
  source: CheckSource;
  page: CheckPage;
  onEnded: (how: EndedBy) => void;
  onUncovered: (page: CheckPage) => void;
};

type Panel = 'lock-in' | 'hand-on' | 'return' | null;

function Notices({ page }: { page: CheckPage }) {
  const lockIn = verdictOf(page, 'lock-in');
  return (
    <>
      {page.hasSeenFigures && (
        <Notice kind="caution" title="You are marked as having seen this order’s other figures.">
          Another checker is asked first.
        </Notice>
      )}
      {!lockIn.allowed && (
        <Notice kind="stop" title="You cannot lock in figures here." live>
          {lockIn.words}
        </Notice>
      )}
    </>
  );
}

/** Before lock-in: what may be seen, one's own figures, and a cover with nothing under it. */
export function CoveredView({ source, page, onEnded, onUncovered }: CoveredViewProps) {
  const check = useCheckForm(source, page);
  const [panel, setPanel] = useState<Panel>(null);
  const [wrongChild, setWrongChild] = useState<string | null>(null);
  const isOffline = useOfflineSince() !== null;
  const close = () => setPanel(null);
  const shut = (act: 'lock-in' | 'pass-on' | 'cannot-verify') => {
    const { allowed, words } = verdictOf(page, act);
    return allowed ? (isOffline ? OFFLINE : undefined) : words || 'Not open to you now.';
  };
  const lockInShut = shut('lock-in');
  const askToLockIn = () => {
    setWrongChild(null);
    if (check.isComplete()) setPanel('lock-in');
  };
  const rows = checkRows(check.asked.kind, check.asked.shortForm, check.form);
  const isOwn = source.via === 'own';
  return (
    <>
      <Notices page={page} />
      <main className="chk" id="main" tabIndex={-1}>
        <MaySee page={page} />
        <OwnFigures {...{ page, check, wrongChild }} />
        <CoverPanel
          rows={rows.map(({ head, isTall }) => ({ label: head, tall: isTall }))}
          sentence={SENTENCE}
        />
      </main>
      {check.status.theirs !== null && (
        <MovedFigures page={page} check={check} theirs={check.status.theirs} />
      )}
      {panel === 'lock-in' && (
        <FootPanel>
          <LockInPanel
            {...{ source, check, onUncovered }}
            onWrongChild={(words) => {
              setWrongChild(words);
              close();
            }}
            onFault={close}
            onClose={close}
          />
        </FootPanel>
      )}
      {panel === 'hand-on' && source.via === 'own' && (
        <FootPanel>
          {' '}
          <HandOnPanel
            page={page}
            versionId={source.versionId}
            onClose={close}
            onDone={() => onEnded('handed-on')}
          />
        </FootPanel>
      )}
      {panel === 'return' && source.via === 'own' && (
        <FootPanel>
          {' '}
          <ReturnPanel versionId={source.versionId} onClose={close} onDone={() => onEnded('returned')} />
        </FootPanel>
      )}
      {panel === null && (
        <BottomBar
          kind="covered"
          state={<StateWord state={page.state} />}
          say={
            <>
              <b>Nobody can show you the other figures first.</b>{' '}
              <span className="max-wide:hidden">
                {isOwn
                  ? 'If you have already seen them, hand the check to someone else.'
                  : 'If you have already seen them, close this page without locking in.'}
              </span>
              {lockInShut && (
                <span className="block" id="lock-in-shut">
                  {lockInShut}
                </span>
              )}
            </>
          }
        >
          {isOwn && (
            <>
              {!shut('pass-on') && (
                <Button kind="quiet" onClick={() => setPanel('hand-on')}>
                  Hand this check to someone else
                </Button>
              )}
              {!shut('cannot-verify') && (
                <Button onClick={() => setPanel('return')}>Cannot verify: return</Button>
              )}
              {!verdictOf(page, 'lock-in').allowed && (
                <Link className={buttonClass('secondary')} to="/checks">
                  Back to my checks
                </Link>
              )}
            </>
          )}
          <Button
            kind="plum"
            glyph="covered"
            reasonId={lockInShut ? 'lock-in-shut' : undefined}
            onClick={askToLockIn}
          >
            Lock in my figures
          </Button>
        </BottomBar>
      )}
    </>
  );
}
