import { Navigate } from 'react-router-dom';
import { useKnownMe } from '@/features/accounts/api/use-me';

const LAST_WARD = 'brimline-ward';

/** The ward last looked at on this device, if it is still theirs; its id is no clinical data. */
export function HomePage() {
  const me = useKnownMe();
  const last = localStorage.getItem(LAST_WARD);
  const ward = me.wards.find(({ id }) => id === last) ?? me.wards[0];
  if (ward) return <Navigate to={`/wards/${ward.id}`} replace />;
  return (
    <div className="page">
      <div className="blank">
        <h1>No ward yet</h1>
        <p>Your account is not a member of any ward. Ask your administrator.</p>
      </div>
    </div>
  );
}
