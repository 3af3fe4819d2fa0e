import { QueryClientProvider, useMutation, useQuery } from '@tanstack/react-query';
import { Suspense, useEffect, useState } from 'react';
import { NavLink, Outlet, useLocation, useNavigate } from 'react-router-dom';
import { OfflineBar } from '@/components/ui/offline-bar';
import { Reading } from '@/components/ui/reading';
import { SkipLink } from '@/components/ui/skip-link';
import { TopBar } from '@/components/ui/top-bar';
import { LockScreen } from '@/features/accounts/components/lock-screen';
import { setMe, useMe } from '@/features/accounts/api/use-me';
import { call } from '@/lib/api';
import { POLL_MS, problemCode, queryClient } from '@/lib/query-client';
import { useOfflineSince } from '@/lib/use-online';
import { useServerNow } from '@/lib/server-clock';
import { formatTime, instant } from '@shared/time';
import type { Me } from '@shared/routes/accounts';
import { ServerSilent } from './server-silent';
import { useShortcuts } from './use-shortcuts';
import { WardLinks } from './ward-links';

/** A session that locked while a page was asking: the lock screen takes over, the page stays mounted. */
function useLockNotice(): void {
  useEffect(() => {
    const note = (error: unknown) => {
      const code = problemCode(error);
      if (code === 'session-locked' || code === 'signed-out')
        void queryClient.invalidateQueries({ queryKey: ['me'] });
    };
    const unsubscribe = [
      queryClient.getQueryCache().subscribe(({ query }) => note(query.state.error)),
      queryClient.getMutationCache().subscribe(({ mutation }) => note(mutation?.state.error)),
    ];
    return () => unsubscribe.forEach((stop) => stop());
  }, []);
}

function useQueueCount(me: Me): number | null {
  const isClinical = me.account.roles.some((role) => role !== 'administrator');
  const { data } = useQuery({
    queryKey: ['checks', 'queue'],
    queryFn: ({ signal }) => call('checkQueue', { background: true, signal }),
    refetchInterval: POLL_MS,
    enabled: isClinical && !me.session.locked,
  });
  return data ? data.rows.filter(({ barred }) => barred === null).length : null;
}

function Navigation({ me }: { me: Me }) {
  const count = useQueueCount(me);
  return (
    <>
      <WardLinks wards={me.wards} />
      <NavLink to="/checks">My checks{count === null || count === 0 ? '' : `, ${count}`}</NavLink>
      {me.wards.some(({ entitlements }) => entitlements.includes('senior')) && (
        <NavLink to="/exceptions">Senior decisions</NavLink>
      )}
      <NavLink to="/children" end>
        Find a child
      </NavLink>
    </>
  );
}

function SignedIn({ me }: { me: Me }) {
  const now = useServerNow(me.now);
  const offlineSince = useOfflineSince();
  const lock = useMutation({ mutationFn: () => call('lock', { body: {} }), onSuccess: setMe });
  const { zone } = me.hospital;
  useLockNotice();
  useShortcuts(me.wards[0]?.id);
  const isLocked = me.session.locked;
  return (
    <>
      {isLocked && <LockScreen me={me} />}
      <div hidden={isLocked} className="shell">
        <SkipLink />
        <TopBar
          time={formatTime(now, zone)}
          who={{ name: me.account.name, grade: me.account.title }}
          extras={<NavLink to="/account">My account</NavLink>}
          onLock={() => lock.mutate()}
        >
          <Navigation me={me} />
        </TopBar>
        {offlineSince !== null && <OfflineBar since={formatTime(instant(offlineSince), zone)} />}
        <Suspense fallback={<Reading what="this page" />}>
          <Outlet />
        </Suspense>
      </div>
    </>
  );
}

function Entry() {
  const me = useMe();
  const navigate = useNavigate();
  const location = useLocation();
  const [waited, setWaited] = useState(false);
  const isOut = problemCode(me.error) === 'signed-out';
  useEffect(() => {
    if (isOut)
      void navigate(`/sign-in?next=${encodeURIComponent(location.pathname + location.search)}`, {
        replace: true,
      });
  }, [isOut, navigate, location]);
  useEffect(() => {
    // nothing is drawn for a short wait: a flash of "reading" is worse than a blank
    const timer = setTimeout(() => setWaited(true), 400);
    return () => clearTimeout(timer);
  }, []);
  if (me.data && !isOut) return <SignedIn me={me.data} />;
  if (me.error && !isOut) return <ServerSilent retry={() => void me.refetch()} />;
  return waited ? <Reading what="your wards" /> : null;
}

/** Everything behind sign-in. */
export const AppShell = () => (
  <QueryClientProvider client={queryClient}>
    <Entry />
  </QueryClientProvider>
);
