import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { useNavigate, useParams } from 'react-router-dom';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Notice } from '@/components/ui/notice';
import { Reading } from '@/components/ui/reading';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { call } from '@/lib/api';
import { putProblem } from '@/lib/put-problem';
import type { ChildHead } from '@shared/routes/children';
import { refreshChild, useChart } from '../api/use-chart';
import { asTyped, childFormSchema, type ReadChild, type TypedChild } from '../forms/child-form';
import { ChildFields } from './child-fields';
import { ChildStrip } from './child-strip';

export function EditPage() {
  const { childId = '' } = useParams();
  const { data, error } = useChart(childId);
  if (data) return <EditForm child={data.child} />;
  return (
    <main className="page" id="main">
      {error ? (
        <ErrorPanel title="The child could not be read">{error.message}</ErrorPanel>
      ) : (
        <Reading what="the child" />
      )}
    </main>
  );
}

/** Keeps the revision it began with: a change made elsewhere meanwhile is told, never overwritten. */
function EditForm({ child: shown }: { child: ChildHead }) {
  const { zone } = useKnownMe().hospital;
  const navigate = useNavigate();
  const [child] = useState(shown);
  const [problem, setProblem] = useState<string | null>(null);
  const form = useForm<TypedChild, unknown, ReadChild>({
    resolver: zodResolver(childFormSchema),
    defaultValues: asTyped(child, zone),
  });
  const keep = form.handleSubmit(async ({ bed: _bed, wardId: _ward, ...fields }) => {
    setProblem(null);
    try {
      await call('editChild', { params: { id: child.id }, body: { ...fields, rev: child.rev } });
      await refreshChild(child.id);
      void navigate(`/children/${child.id}`);
    } catch (error) {
      setProblem(putProblem(error, form.setError, [...Object.keys(form.getValues()), 'bornAt']));
    }
  });
  return (
    <form onSubmit={keep} noValidate aria-labelledby="edit-head">
      <ChildStrip child={shown} weight={null} />
      <main className="page narrow-page" id="main">
        <div className="wh">
          <h1 id="edit-head">Correct this child’s details</h1>
        </div>
        {problem && (
          <Notice kind="stop" title="Not kept.">
            {problem}
          </Notice>
        )}
        <ChildFields form={form} wards={null} />
      </main>
      <BottomBar
        say={
          <>
            <b>Signed orders keep what they were signed with.</b> A corrected name is shown beside them.
          </>
        }
      >
        <Button onClick={() => void navigate(-1)}>Back without a change</Button>
        <Button
          kind="primary"
          type="submit"
          busy={form.formState.isSubmitting}
          busyLabel="Keeping, please wait"
        >
          Keep the correction
        </Button>
      </BottomBar>
    </form>
  );
}
