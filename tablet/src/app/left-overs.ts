import { may } from '@steepfall/shared/contracts';
import { sessionState, subscribeSession } from '#lib/session.ts';

const AFTER_START_MS = 4_000;

/**
 * What a run page left unsent when it was closed goes out from any page, once somebody of the house is signed in. The code for it
 * is fetched after the first paint, and the line to the hub is opened only when there is something to send.
 */
export function startLeftOvers(): void {
  let askedFor: string | null = null;
  const look = () => {
    const { known } = sessionState();
    if (!known || !may(known.member.role, 'runs:act') || askedFor === known.house.id) return;
    const houseId = known.house.id;
    askedFor = houseId;
    import('#lib/run-store/open-runs.ts')
      .then(({ sendLeftOvers }) => sendLeftOvers(houseId))
      .catch(() => {
        askedFor = null;
      });
  };
  setTimeout(() => {
    subscribeSession(look);
    look();
  }, AFTER_START_MS);
}
