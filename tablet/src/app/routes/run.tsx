import { AlertStrips } from '#features/alerts/alert-strips.tsx';
import { AlertTakeOver } from '#features/alerts/alert-take-over.tsx';
import { Ringer } from '#features/alerts/ringer.tsx';
import { SoundCheck } from '#features/alerts/sound-check.tsx';
import { FollowDialog } from '#features/follow/follow-dialog.tsx';
import { RehearsalBanner } from '#features/rehearsal/rehearsal-banner.tsx';
import { RunSheetPage } from '#features/run-sheet/run-sheet-page.tsx';

/** Where the features of a run meet. */
export function RunRoute() {
  return (
    <>
      <RunSheetPage
        rehearsal={<RehearsalBanner />}
        soundCheck={<SoundCheck />}
        strips={<AlertStrips />}
        TakeOver={AlertTakeOver}
        ringer={<Ringer />}
      />
      <FollowDialog />
    </>
  );
}
