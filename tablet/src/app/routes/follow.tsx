import { FollowPage } from '#features/follow/follow-page.tsx';

export function FollowRoute() {
  return <FollowPage />;
}
