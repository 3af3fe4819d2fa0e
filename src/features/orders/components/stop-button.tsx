import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { problemCode } from '@/lib/query-client';
import { useAct } from '../api/use-act';
import { rereadOrder } from '../api/use-order';
import { problemWords } from '../api/problem-words';
import { ActPanel } from './act-panel';
import { Refusal } from './refusal';

/** Stop, in one touch; its reason may follow. */
export function useStop(versionId: string) {
  const stop = useAct('stop');
  const stopReason = useAct('stopReason');
  const [owes, setOwes] = useState(false);
  const params = { id: versionId };
  const run = async () => {
    try {
      const { reasonOwed } = await stop.mutateAsync({ params, body: { reason: '', volumeInfusedMl: null } });
      setOwes(reasonOwed);
      await rereadOrder(versionId);
    } catch {
      // told below, with what to do at the pump
    }
  };
  const button = (
    <Button
      kind="stop"
      glyph="stopped"
      busy={stop.isPending}
      busyLabel="Stopping, please wait"
      onClick={() => void run()}
    >
      Stop the infusion
    </Button>
  );
  const trouble = stop.error && (
    <Refusal title="Stop the pump by hand; not recorded.">
      {problemCode(stop.error) === null
        ? 'The server did not answer. Press Stop again when the line is back: it is recorded once.'
        : problemWords(stop.error)}
    </Refusal>
  );
  const panel = owes && (
    <ActPanel
      title="Stopped. Why?"
      tone="stop"
      act="Keep the reason"
      busy="Keeping, please wait"
      failed="The reason was not kept."
      reason="Why the infusion was stopped"
      volume="Volume infused so far, if you have read it"
      volumeIsOptional
      closeLabel="Say it later"
      send={({ reason, volumeMl }) =>
        stopReason.mutateAsync({ params, body: { reason, volumeInfusedMl: volumeMl.trim() || null } })
      }
      onDone={() => {
        setOwes(false);
        void rereadOrder(versionId);
      }}
      onClose={() => setOwes(false)}
    />
  );
  return { button, trouble, panel };
}
