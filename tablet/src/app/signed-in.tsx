import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { useSession } from '#lib/session.ts';
import { Starting } from './starting.tsx';

/**
 * Lets through whoever is signed in on this station, and whoever was when the hub cannot be asked: work goes on without
 * the hub, and the hub checks everything again when it is back.
 */
export function SignedIn() {
  const session = useSession();
  const location = useLocation();
  if (session.known) return <Outlet />;
  if (session.status === 'starting') return <Starting />;
  const from = `${location.pathname}${location.search}`;
  return <Navigate to="/sign-in" replace state={{ from }} />;
}
