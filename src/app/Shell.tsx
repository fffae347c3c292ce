import { useQuery } from '@tanstack/react-query';
import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { ErrorState, LoadingState } from '@/components/states';
import { sessionQuery } from '@/queries/session';
import { AppBar } from './AppBar';

const CUSTOMER_HOME = '/my-samples';
const AT_THE_BENCH = /^\/studies\/\d+\/bench\/\d+$/;

/** Everything behind the sign-in: the bar, and the page below it. */
export function Shell() {
  const { data: user, isPending, error, refetch } = useQuery(sessionQuery);
  const { pathname, search } = useLocation();
  if (isPending) return <LoadingState what="Looking whether you are signed in." />;
  if (error)
    return (
      <main className="page">
        <ErrorState error={error} onRetry={() => void refetch()} />
      </main>
    );
  if (!user) {
    const back = pathname === '/' ? '' : `?back=${encodeURIComponent(pathname + search)}`;
    return <Navigate to={`/sign-in${back}`} replace />;
  }
  if (user.roles.includes('customer') && pathname !== CUSTOMER_HOME)
    return <Navigate to={CUSTOMER_HOME} replace />;
  return (
    <>
      <a href="#content" className="skip">
        To the content
      </a>
      {/* at the bench the run sheet has the whole screen */}
      {!AT_THE_BENCH.test(pathname) && <AppBar user={user} />}
      <div id="content">
        <Outlet />
      </div>
    </>
  );
}
