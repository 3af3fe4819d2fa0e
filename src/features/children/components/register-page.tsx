import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect, useRef, useState } from 'react';
import { useForm } from 'react-hook-form';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { BottomBar } from '@/components/ui/bottom-bar';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { useKnownMe } from '@/features/accounts/api/use-me';
import { call } from '@/lib/api';
import { putProblem } from '@/lib/put-problem';
import { newKey } from '@/lib/server-answer';
import { childFormSchema, emptyChild, type ReadChild, type TypedChild } from '../forms/child-form';
import { ChildFields } from './child-fields';

/** A new child on the ward. */
export function RegisterPage() {
  const me = useKnownMe();
  const navigate = useNavigate();
  const [params] = useSearchParams();
  const ward = me.wards.find(({ id }) => id === params.get('ward')) ?? me.wards[0];
  const [problem, setProblem] = useState<string | null>(null);
  const key = useRef(newKey());
  const form = useForm<TypedChild, unknown, ReadChild>({
    resolver: zodResolver(childFormSchema),
    defaultValues: emptyChild(ward?.id ?? ''),
  });
  useEffect(() => {
    document.title = 'Register a child · Brimline';
  }, []);

  const register = form.handleSubmit(async ({ bed, wardId, ...fields }) => {
    setProblem(null);
    try {
      const { childId } = await call('registerChild', { key: key.current, body: { ...fields, bed, wardId } });
      void navigate(`/children/${childId}`);
    } catch (error) {
      key.current = newKey();
      setProblem(putProblem(error, form.setError, [...Object.keys(form.getValues()), 'bornAt']));
    }
  });

  return (
    <form onSubmit={register} noValidate aria-labelledby="register-head">
      <main className="page narrow-page" id="main">
        <div className="wh">
          <h1 id="register-head">Register a child</h1>
        </div>
        {problem && (
          <Notice kind="stop" title="Not registered.">
            {problem}
          </Notice>
        )}
        <ChildFields form={form} wards={me.wards} />
      </main>
      <BottomBar
        say={
          <>
            <b>The child appears on the ward at once.</b> A weight comes next: no order can be worked out
            without one.
          </>
        }
      >
        <Button onClick={() => void navigate(-1)}>Back without registering</Button>
        <Button
          kind="primary"
          type="submit"
          busy={form.formState.isSubmitting}
          busyLabel="Registering, please wait"
        >
          Register the child
        </Button>
      </BottomBar>
    </form>
  );
}
