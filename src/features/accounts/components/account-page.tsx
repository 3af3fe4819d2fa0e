import { useMutation, useQuery } from '@tanstack/react-query';
import { Button } from '@/components/ui/button';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Reading } from '@/components/ui/reading';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { call } from '@/lib/api';
import { queryClient } from '@/lib/query-client';
import { formatDateTime, parseInstant } from '@shared/time';
import { signOut } from '../api/sign-out';
import { useKnownMe } from '../api/use-me';

function Sessions({ zone }: { zone: string }) {
  const { data, error } = useQuery({
    queryKey: ['sessions'],
    queryFn: ({ signal }) => call('sessions', { signal }),
  });
  const revoke = useMutation({
    mutationFn: (id: string) => call('revokeSession', { params: { id }, body: {} }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: ['sessions'] }),
  });
  const moment = (at: string) => {
    const instant = parseInstant(at);
    return instant === undefined ? '' : formatDateTime(instant, zone);
  };
  if (error) return <ErrorPanel title="Your sessions could not be read">{error.message}</ErrorPanel>;
  if (!data) return <Reading what="your sessions" />;
  return (
    <table className="plain-table">
      <caption className="vh">Where you are signed in</caption>
      <thead>
        <tr>
          <th scope="col">Device</th>
          <th scope="col">Signed in</th>
          <th scope="col">Last used</th>
          <th scope="col">
            <span className="vh">End it</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {data.sessions.map((session) => (
          <tr key={session.id}>
            <td>{session.device}</td>
            <td>{moment(session.madeAt)}</td>
            <td>{moment(session.lastSeenAt)}</td>
            <td>
              {session.isThis ? (
                <span className="soft">this one</span>
              ) : (
                <Button small busy={revoke.isPending} onClick={() => revoke.mutate(session.id)}>
                  Sign out there
                </Button>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** Who one is here, and where one is signed in. */
export function AccountPage() {
  const me = useKnownMe();
  const { account, hospital, wards } = me;
  return (
    <main className="page narrow-page" id="main">
      <div className="wh">
        <h1>{account.name}</h1>
        <p>
          {account.title}, {hospital.name}. Registration number{' '}
          {account.registrationNumber ?? 'not on the account'}.
        </p>
      </div>
      <section className="sec">
        <h2>Wards and entitlements</h2>
        <ul className="lines-list">
          {wards.map((ward) => (
            <li key={ward.id}>
              {ward.name} ward
              {ward.entitlements.length > 0 && <span className="soft">: {ward.entitlements.join(', ')}</span>}
            </li>
          ))}
        </ul>
      </section>
      <section className="sec">
        <h2>Day and night</h2>
        <ThemeSwitch />
      </section>
      <section className="sec">
        <h2>Where you are signed in</h2>
        <Sessions zone={hospital.zone} />
      </section>
      {me.hasMailbox && (
        <p className="note">
          This program runs its own mail fake: <a href="/mailbox">read its mailbox</a>.
        </p>
      )}
      <p className="acts-row">
        <Button onClick={() => void signOut()}>Sign out</Button>
      </p>
    </main>
  );
}
