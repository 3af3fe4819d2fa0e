import { useMutation } from '@tanstack/react-query';
import { useEffect, useRef, useState, type FormEvent } from 'react';
import { Mark } from '@/components/ui/mark';
import { call } from '@/lib/api';
import type { Me } from '@shared/routes/accounts';
import { setMe } from '../api/use-me';
import { signOut } from '../api/sign-out';

/** Covers the page, which stays mounted below: whatever was typed is still there after unlocking. */
export function LockScreen({ me }: { me: Me }) {
  const [password, setPassword] = useState('');
  const field = useRef<HTMLInputElement>(null);
  const unlock = useMutation({
    mutationFn: () => call('unlock', { body: { password } }),
    onSuccess: (next) => setMe(next),
    onSettled: () => setPassword(''),
  });
  useEffect(() => field.current?.focus(), []);

  const submit = (event: FormEvent) => {
    event.preventDefault();
    unlock.mutate();
  };

  return (
    <main className="sign-in" id="main">
      <form className="sign-in-form" onSubmit={submit} aria-labelledby="lock-head">
        <p className="brand">
          <Mark /> Brimline
        </p>
        <h1 id="lock-head">Locked</h1>
        <p className="soft">{me.account.name}, your page is kept as you left it.</p>
        {unlock.error && (
          <p className="err" role="alert">
            {unlock.error.message}
          </p>
        )}
        <label className="f">
          <span className="k">Password</span>
          <span className="in">
            <input
              ref={field}
              type="password"
              autoComplete="current-password"
              value={password}
              onChange={(event) => setPassword(event.target.value)}
            />
          </span>
        </label>
        <button className="btn p" type="submit" disabled={unlock.isPending || password === ''}>
          {unlock.isPending ? 'Unlocking, please wait' : 'Unlock'}
        </button>
        <button className="btn q" type="button" onClick={() => void signOut()}>
          I am someone else: sign out
        </button>
      </form>
    </main>
  );
}
