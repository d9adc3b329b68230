import { ButtonLink } from '#components/button.tsx';
import { Page } from '#components/page.tsx';

export function NotFoundPage() {
  return (
    <Page
      title="Nothing hangs here"
      lead="The address leads to no page of this house. It may have been mistyped, or what it named is gone."
    >
      <div>
        <ButtonLink look="primary" to="/">
          Go to today
        </ButtonLink>
      </div>
    </Page>
  );
}
