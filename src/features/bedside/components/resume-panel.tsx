import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { InlinePanel } from '@/components/ui/inline-panel';
import { problemWords } from '@/features/orders/api/problem-words';
import { useAct } from '@/features/orders/api/use-act';
import { Refusal } from '@/features/orders/components/refusal';
import { ProblemError } from '@/lib/server-answer';
import { isByPump } from '@shared/bedside/compare-pump';
import { stepVerdictSchema, type BedsidePage, type StepVerdict } from '@shared/routes/bedside';
import { z } from 'zod';
import { rereadBedside } from '../api/use-bedside';
import { emptyEntries } from '../forms/bedside-work';
import { PumpFields } from './step-fields';

/** What a refusal says of the pump; undefined where it is about something else. */
function verdictIn(error: unknown): StepVerdict | undefined {
  if (!(error instanceof ProblemError)) return undefined;
  const read = z.object({ verdicts: z.array(stepVerdictSchema) }).safeParse(error.problem.data);
  return read.success ? read.data.verdicts[0] : undefined;
}

/** After a hold the pump is read again; it goes on only as ordered. */
export function ResumePanel({ page, onClose }: { page: BedsidePage; onClose: () => void }) {
  const resume = useAct('resume');
  const [pump, setPump] = useState(emptyEntries().pump);
  const verdict = verdictIn(resume.error);
  const send = () =>
    resume.mutate(
      { params: { id: page.versionId }, body: { pump } },
      { onSuccess: () => void rereadBedside(page.versionId).then(onClose) },
    );
  return (
    <InlinePanel
      title="Compare the pump, then resume"
      tone={verdict ? 'stop' : 'tide'}
      onClose={onClose}
      actions={
        <Button
          kind="primary"
          glyph="running"
          busy={resume.isPending}
          busyLabel="Comparing, please wait"
          onClick={send}
        >
          Record that it runs again
        </Button>
      }
    >
      {resume.error && !verdict && (
        <Refusal title="It is still held in the record.">{problemWords(resume.error)}</Refusal>
      )}
      <PumpFields
        entries={pump}
        verdict={verdict}
        enter={(changes) => {
          resume.reset();
          setPump({ ...pump, ...changes });
        }}
        onLast={() => undefined}
        byPump={isByPump(page.content)}
        idPrefix="resume"
      />
    </InlinePanel>
  );
}
