import { useEffect, useRef, useState, type FormEvent } from 'react';
import { useSearchParams } from 'react-router-dom';
import { Mark } from '@/components/ui/mark';
import { ProblemError, send, UnreachableError } from '@/lib/server-answer';

/** Only a path of this site may follow sign-in. */
export const safeNext = (next: string | null): string => (next && /^\/(?![/\\])/.test(next) ? next : '/');

const messageOf = (error: unknown): string => {
  if (error instanceof ProblemError) return error.problem.detail || error.problem.title;
  if (error instanceof UnreachableError)
    return 'The server did not answer. Nothing was sent. Try again in a moment.';
  return 'Something went wrong on this page. Load it again.';
};

/** Kept free of the query, form and schema packages: it is the first thing a cold device loads. */
export function SignInPage() {
  const [params] = useSearchParams();
  const [email, setEmail] = useState('');
  const [password, setPassword] = useState('');
  const [message, setMessage] = useState<string | null>(null);
  const [isBusy, setBusy] = useState(false);
  const alert = useRef<HTMLParagraphElement>(null);

  useEffect(() => {
    document.title = 'Sign in · Brimline';
  }, []);
  useEffect(() => {
    if (message) alert.current?.focus();
  }, [message]);

  const signIn = async (event: FormEvent) => {
    event.preventDefault();
    if (email.trim() === '' || password === '') {
      setMessage('Type your e-mail address and your password.');
      return;
    }
    setBusy(true);
    setMessage(null);
    try {
      await send('/api/sign-in', { method: 'POST', body: { email, password } });
      // a full load: nothing of an earlier person stays in memory
      window.location.assign(safeNext(params.get('next')));
    } catch (error) {
      setMessage(messageOf(error));
      setPassword('');
      setBusy(false);
    }
  };

  return (
    <main className="sign-in" id="main">
      <form className="sign-in-form" onSubmit={signIn} aria-labelledby="sign-in-head" noValidate>
        <p className="brand">
          <Mark /> Brimline
        </p>
        <h1 id="sign-in-head">Sign in</h1>
        <p className="soft">
          Intravenous fluid orders, checked by a second person who has not seen the answer.
        </p>
        {message && (
          <p className="err" role="alert" tabIndex={-1} ref={alert}>
            {message}
          </p>
        )}
        <label className="f">
          <span className="k">E-mail address</span>
          <span className="in">
            <input
              type="email"
              name="email"
              autoComplete="username"
              autoFocus
              value={email}
              onChange={(event) => setEmail(event.target.value)}
            />
          </span>
        </label>
        <label className="f">
          <span className="k">Password</span>
          <span className="in">
            <input
              type="password"
              name="password"
              autoComplete="current-password"
              value={password}
              onChange={(event) => setPassword(event.target.value)}
            />
          </span>
        </label>
        <button className="btn p" type="submit" disabled={isBusy}>
          {isBusy ? 'Signing in, please wait' : 'Sign in'}
        </button>
        <p className="tag">
          Brimline supports, and does not replace, clinical judgement. Follow local policy. Only licensed
          clinicians prescribe, check and give.
        </p>
      </form>
    </main>
  );
}
