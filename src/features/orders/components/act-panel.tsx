import { useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { NumberField } from '@/components/ui/number-field';
import { TextareaField } from '@/components/ui/textarea-field';
import { usePassword } from '../api/use-password';
import { problemWords } from '../api/problem-words';
import { PasswordField } from './password-field';
import { Refusal } from './refusal';

export type ActEntries = { reason: string; volumeMl: string; password: string };

type ActPanelProps = {
  title: string;
  /** "Withdraw the order": what the button does. */
  act: string;
  busy: string;
  /** "The order was not withdrawn." */
  failed: string;
  tone?: 'tide' | 'ochre' | 'stop';
  children?: ReactNode;
  /** Words of the reason field; absent: no reason is asked. */
  reason?: string;
  reasonIsOptional?: boolean;
  volume?: string;
  volumeIsOptional?: boolean;
  withPassword?: boolean;
  closeLabel?: string;
  send: (entries: ActEntries) => Promise<unknown>;
  onDone: () => void;
  onClose: () => void;
};

const MIN_REASON = 3;

/** One act with its reason, its volume or its password; what was entered stays when it fails. */
export function ActPanel(props: ActPanelProps) {
  const {
    title,
    act,
    busy,
    failed,
    tone,
    children,
    reason,
    volume,
    withPassword = false,
    send,
    onDone,
    onClose,
  } = props;
  const [entries, setEntries] = useState({ reason: '', volumeMl: '' });
  const [isAsked, setAsked] = useState(false);
  const [isBusy, setBusy] = useState(false);
  const [trouble, setTrouble] = useState('');
  const password = usePassword();
  const owesReason =
    reason !== undefined && !props.reasonIsOptional && entries.reason.trim().length < MIN_REASON;
  const owesVolume = volume !== undefined && !props.volumeIsOptional && entries.volumeMl.trim() === '';

  const run = async () => {
    setAsked(true);
    setTrouble('');
    if (owesReason || owesVolume || (withPassword && !password.isThere())) return;
    setBusy(true);
    try {
      await send({ ...entries, password: password.value });
      onDone();
    } catch (error) {
      if (!password.takes(error)) setTrouble(problemWords(error));
    } finally {
      setBusy(false);
    }
  };

  return (
    <InlinePanel
      title={title}
      tone={tone}
      aboveBar
      onClose={onClose}
      closeLabel={props.closeLabel}
      actions={
        <Button
          kind={tone === 'stop' ? 'stop' : 'primary'}
          busy={isBusy}
          busyLabel={busy}
          onClick={() => void run()}
        >
          {act}
        </Button>
      }
    >
      {trouble && <Refusal title={failed}>{trouble}</Refusal>}
      {children}
      {reason !== undefined && (
        <TextareaField
          label={reason}
          rows={2}
          value={entries.reason}
          onChange={({ target }) => setEntries({ ...entries, reason: target.value })}
          error={isAsked && owesReason ? 'Say why, in a few words.' : undefined}
        />
      )}
      {volume !== undefined && (
        <NumberField
          label={volume}
          unit="mL"
          value={entries.volumeMl}
          onChange={({ target }) => setEntries({ ...entries, volumeMl: target.value })}
          error={isAsked && owesVolume ? 'Type the volume in mL, as the pump shows it.' : undefined}
        />
      )}
      {withPassword && <PasswordField value={password.value} onType={password.type} error={password.error} />}
    </InlinePanel>
  );
}
