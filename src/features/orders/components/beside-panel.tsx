import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { Row } from '@/components/ui/group';
import { InlinePanel } from '@/components/ui/inline-panel';
import { TextField } from '@/components/ui/text-field';
import { problemWords } from '../api/problem-words';
import { useAct } from '../api/use-act';
import { usePassword } from '../api/use-password';
import { PasswordField } from './password-field';
import { Refusal } from './refusal';

/** A colleague checks on this device: the author's session rests, and the page is loaded afresh for them. */
export function BesidePanel({ versionId, onClose }: { versionId: string; onClose: () => void }) {
  const open = useAct('openBeside');
  const password = usePassword();
  const [email, setEmail] = useState('');
  const [isAsked, setAsked] = useState(false);
  const [trouble, setTrouble] = useState('');
  const send = async () => {
    setAsked(true);
    setTrouble('');
    if (email.trim() === '' || !password.isThere()) return;
    try {
      await open.mutateAsync({ params: { id: versionId }, body: { email, password: password.value } });
      // a full load: nothing of the author's page stays in memory under the checker's eyes
      window.location.assign('/beside');
    } catch (error) {
      if (!password.takes(error)) setTrouble(problemWords(error));
    }
  };
  return (
    <InlinePanel
      title="Check beside me"
      tone="plum"
      aboveBar
      onClose={onClose}
      actions={
        <Button
          kind="plum"
          glyph="covered"
          busy={open.isPending}
          busyLabel="Opening, please wait"
          onClick={() => void send()}
        >
          Open the check for them
        </Button>
      }
    >
      <p>
        Your figures are off the screen now. Hand the device to your colleague: they sign in for this one
        check, and your own session rests until they are done.
      </p>
      {trouble && <Refusal title="The check was not opened.">{trouble}</Refusal>}
      <Row>
        <TextField
          label="Their e-mail address"
          type="email"
          autoComplete="off"
          width="full"
          value={email}
          onChange={({ target }) => setEmail(target.value)}
          error={isAsked && email.trim() === '' ? 'Type the checker’s e-mail address.' : undefined}
        />
        <PasswordField
          label="Their password"
          value={password.value}
          onType={password.type}
          error={password.error}
        />
      </Row>
    </InlinePanel>
  );
}
