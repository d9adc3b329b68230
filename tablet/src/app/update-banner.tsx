import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { takeUpdate, useAppUpdate } from './app-updates.ts';

/** Offered only while no run is open on this station. */
export function UpdateBanner() {
  const { isOffered } = useAppUpdate();
  if (!isOffered) return null;
  return (
    <Banner
      title="A new version is ready"
      action={
        <Button look="primary" onClick={() => void takeUpdate()}>
          Use it now
        </Button>
      }
    >
      The page loads again. Nothing that was recorded is touched.
    </Banner>
  );
}
