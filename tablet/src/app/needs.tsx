import type { Permission } from '@steepfall/shared/contracts';
import { Outlet } from 'react-router-dom';
import { ButtonLink } from '#components/button.tsx';
import { Page } from '#components/page.tsx';
import { useKnown, useMay } from '#lib/session.ts';

/** Pages that a role does not see say so, before the hub has to. */
export function Needs({ permission }: { permission: Permission }) {
  const may = useMay();
  const { member } = useKnown();
  if (may(permission)) return <Outlet />;
  return (
    <Page
      title="Not for your role"
      lead={`You are signed in as ${member.role}. An owner of the house can change that.`}
    >
      <div>
        <ButtonLink look="primary" to="/">
          Go to today
        </ButtonLink>
      </div>
    </Page>
  );
}
