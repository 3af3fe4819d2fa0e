import { useState } from 'react';
import { BlankState } from '@/components/ui/blank-state';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { InlinePanel } from '@/components/ui/inline-panel';
import { Notice } from '@/components/ui/notice';
import { Reading } from '@/components/ui/reading';
import { StateWord } from '@/components/ui/state-word';
import { TextField } from '@/components/ui/text-field';

export function KitMessages() {
  return (
    <div className="grid gap-s4">
      <div className="grid gap-s5 wide:grid-cols-3">
        <BlankState title="No checks wait for you" action={<Button>See the whole ward</Button>}>
          When someone asks you to check an order, it appears here.
        </BlankState>
        <Reading what="Heron ward" />
        <ErrorPanel
          title="The order was not signed"
          takesFocus={false}
          action={<Button kind="primary">Try to sign again</Button>}
        >
          The server did not answer. Nothing was sent. Your draft is kept on this computer.
        </ErrorPanel>
      </div>
      <Notice kind="caution" title="Caution." action={<Button small>Ask for a review</Button>}>
        Can be passed, with a reason that is kept.
      </Notice>
      <Notice kind="stop" title="Hard stop.">
        Cannot be passed by anyone. Says what to change.
      </Notice>
      <Notice kind="agrees" title="Agrees.">
        Said once, where the eye already is.
      </Notice>
    </div>
  );
}

export function KitBars() {
  const [isSigning, setIsSigning] = useState(false);
  return (
    <>
      <BottomBar
        kind="over"
        say={
          <>
            <b>This order cannot be signed: 620 mL is 120 mL over the brim.</b>A bolus holds 500 mL at most.
            Lower the dose and the sign button comes back.
          </>
        }
      >
        <Button>Keep as a draft</Button>
        <Button kind="primary">Set to 500 mL (8.1 mL/kg)</Button>
      </BottomBar>
      {isSigning && (
        <InlinePanel
          title="Sign this order"
          aboveBar
          onClose={() => setIsSigning(false)}
          actions={<Button kind="primary">Sign with my password</Button>}
        >
          <p>
            Sodium chloride 0.9% + glucose 5% at 52.1 millilitres an hour, 1250 millilitres over 24 hours.
          </p>
          <TextField label="Your password, again" type="password" autoComplete="current-password" />
        </InlinePanel>
      )}
      <BottomBar
        state={<StateWord state="draft" />}
        say={
          <>
            <b>Signing locks these figures.</b> A second person then works them out unseen. Nothing runs until
            both agree.
          </>
        }
      >
        <Button kind="quiet">Discard</Button>
        <Button>Keep as a draft</Button>
        <Button kind="primary" glyph="signed" onClick={() => setIsSigning(true)}>
          Sign and ask for a check
        </Button>
      </BottomBar>
    </>
  );
}
