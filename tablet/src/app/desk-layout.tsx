import { useEffect, useRef } from 'react';
import { Outlet, ScrollRestoration, useLocation } from 'react-router-dom';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { UndoStrip } from '#components/undo.tsx';
import { refreshSession, useSession } from '#lib/session.ts';
import { Rail } from './rail.tsx';
import { UpdateBanner } from './update-banner.tsx';

/** The desk: the rail, what the station must say, the page. */
export function DeskLayout() {
  const session = useSession();
  const { pathname } = useLocation();
  const main = useRef<HTMLElement>(null);
  const shown = useRef(pathname);
  // A page change is silent to a screen reader unless focus moves. Not on the first page: focus belongs to the browser then.
  useEffect(() => {
    if (shown.current === pathname) return;
    shown.current = pathname;
    main.current?.focus({ preventScroll: true });
  }, [pathname]);
  return (
    <div className="md:grid md:grid-cols-[7rem_1fr] xl:grid-cols-[8rem_1fr]">
      <a
        href="#page"
        className="sr-only focus:not-sr-only focus:fixed focus:left-4 focus:top-4 focus:z-50 focus:bg-text focus:px-4 focus:py-3 focus:text-ground"
      >
        Go to the page
      </a>
      <Rail />
      <main id="page" ref={main} tabIndex={-1} className="min-h-dvh min-w-0 pb-24 md:pb-0">
        <UpdateBanner />
        {session.status === 'unconfirmed' ? (
          <Banner
            title="The hub does not answer"
            action={<Button onClick={() => void refreshSession()}>Try again</Button>}
          >
            What is on this page may be old. A run that is open on this tablet goes on without the hub.
          </Banner>
        ) : null}
        <Outlet />
      </main>
      <UndoStrip />
      <ScrollRestoration />
    </div>
  );
}
