import { FollowDialog } from '#features/follow/follow-dialog.tsx';
import { HomePage } from '#features/home/home-page.tsx';

export function HomeRoute() {
  return (
    <>
      <HomePage />
      <FollowDialog />
    </>
  );
}
