import { useNavigate } from 'react-router-dom';
import { Button } from '#components/button.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Page } from '#components/page.tsx';
import { Segmented } from '#components/segmented.tsx';
import { UnitsSection } from '#features/house/units-section.tsx';
import { HandsSection } from '#features/station/hands-section.tsx';
import { PedalSection } from '#features/station/pedal-section.tsx';
import { stationName } from '#lib/ids.ts';
import { signOut, useKnown } from '#lib/session.ts';
import { chooseGround, useGroundChoice, type GroundChoice } from '#lib/theme.ts';

const grounds: { value: GroundChoice; label: string }[] = [
  { value: 'system', label: 'As the device' },
  { value: 'day', label: 'Day' },
  { value: 'night', label: 'Night' },
];

export function AboutRoute() {
  const { member, house } = useKnown();
  const ground = useGroundChoice();
  const navigate = useNavigate();
  return (
    <Page title="This station" above={house.name} lead={`Signed in as ${member.displayName}, ${member.role}.`}>
      <section aria-labelledby="station-set" className="grid gap-6">
        <LevelRule id="station-set">Set for this station</LevelRule>
        <Segmented label="Ground" value={ground} onChange={chooseGround} segments={grounds} />
        <p className="max-w-prose text-body text-soft">
          Day is easier to read in steam and by a window, night in a dark corner. The choice stays on this device. In
          the log this device is <span className="font-medium text-text">{stationName()}</span>.
        </p>
        <div>
          <Button
            onClick={() => {
              void signOut();
              void navigate('/sign-in');
            }}
          >
            Sign out
          </Button>
        </div>
      </section>
      <PedalSection />
      <HandsSection />
      <UnitsSection />
      <section aria-labelledby="what-it-is-not" className="grid gap-6">
        <LevelRule id="what-it-is-not">What Steepfall does not do</LevelRule>
        <p className="max-w-prose text-lead">
          This app keeps your records and reminds you of your steps. It does not decide whether a drink is safe or
          lawful to sell. Follow your local food code and any licensed or qualified person who oversees your process.
          Where they differ from this app, they are right.
        </p>
        <p className="max-w-prose text-lead">
          This tablet is not a safety device. Keep a gas alarm, a thermometer and a kitchen timer that work without it.
        </p>
      </section>
      <section aria-labelledby="about-steepfall" className="grid gap-4">
        <LevelRule id="about-steepfall">About</LevelRule>
        <p className="max-w-prose text-body text-soft">
          Steepfall is a run sheet for people who make sparkling hop tea by the keg. Letters: Space Grotesk, under the
          SIL Open Font License.
        </p>
      </section>
    </Page>
  );
}
