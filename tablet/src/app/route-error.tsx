import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button, ButtonLink } from '#components/button.tsx';
import { Page } from '#components/page.tsx';
import { NotFoundPage } from './not-found-page.tsx';

/** A page that broke. What was recorded is not touched by that, and the words say so. */
export function RouteError() {
  const error = useRouteError();
  if (isRouteErrorResponse(error) && error.status === 404) return <NotFoundPage />;
  const reason = error instanceof Error ? error.message : 'No reason was given.';
  return (
    <Page title="This page did not open" lead="What was recorded is kept. A run that is on goes on at the hub.">
      <div className="grid justify-items-start gap-6">
        <p className="max-w-prose text-body">The page said: {reason}</p>
        <div className="flex flex-wrap gap-3">
          <Button look="primary" onClick={() => location.reload()}>
            Try again
          </Button>
          <ButtonLink to="/">Go to today</ButtonLink>
        </div>
      </div>
    </Page>
  );
}
