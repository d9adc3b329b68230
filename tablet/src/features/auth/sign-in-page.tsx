import { Navigate, useLocation } from 'react-router-dom';
import { useTabTitle } from '#components/page.tsx';
import { Wordmark } from '#components/mark.tsx';
import { useSession } from '#lib/session.ts';
import { FallDrawing } from './fall-drawing.tsx';
import { SignInForm } from './sign-in-form.tsx';

const reasons = {
  asked: 'You have signed out on this station.',
  expired: 'The session on this station has ended. Sign in to go on; nothing that was recorded here is lost.',
  never: null,
} as const;

/** Where to go afterwards: a path of this app only. */
function pathOf(state: unknown): string {
  const from = (state as { from?: unknown } | null)?.from;
  return typeof from === 'string' && /^\/(?!\/)/.test(from) ? from : '/';
}

export function SignInPage() {
  useTabTitle('Sign in');
  const session = useSession();
  const location = useLocation();
  if (session.known) return <Navigate to={pathOf(location.state)} replace />;
  const reason = session.status === 'signed-out' ? reasons[session.reason] : null;
  return (
    <div className="grid min-h-dvh md:grid-cols-[1.15fr_1fr]">
      <header className="relative h-60 overflow-hidden md:h-auto">
        <FallDrawing className="absolute inset-x-0 bottom-0 h-40 w-full md:h-full" />
        <Wordmark className="absolute left-6 top-6 text-[1.75rem] sm:left-10 sm:top-9 md:text-[2.25rem]" />
      </header>
      <main className="flex items-start border-edge px-6 pb-12 pt-8 sm:px-10 md:items-center md:border-l-2 lg:px-16">
        <div className="w-full max-w-md">
          <h1 className="text-display">Sign in</h1>
          {reason ? (
            <p role="status" className="mt-4 text-body text-soft">
              {reason}
            </p>
          ) : null}
          {session.status === 'unconfirmed' ? (
            <p role="alert" className="mt-4 text-body font-medium text-ember">
              The hub does not answer. Check that it is on and on this network; this page tries again by itself.
            </p>
          ) : null}
          <SignInForm />
        </div>
      </main>
    </div>
  );
}
