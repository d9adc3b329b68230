import { z } from 'zod';
import { ValueStore } from '#lib/value-store.ts';

/** `null`: none of the house's, on purpose; left out: the first there is. */
const choiceSchema = z.object({
  kettleId: z.string().nullable().optional(),
  chillerId: z.string().nullable().optional(),
});
type Choice = z.infer<typeof choiceSchema>;

const KEY = 'steepfall.desk-kit';

/** What this station looked at last, so that the next recipe opens on the same kit, also after a reload. */
export const chosenKit = new ValueStore<Choice>(readChoice());

export function chooseKit(part: Choice): void {
  const choice = { ...chosenKit.get(), ...part };
  chosenKit.set(choice);
  try {
    localStorage.setItem(KEY, JSON.stringify(choice));
  } catch {
    // It holds until the page is closed.
  }
}

/** As it was kept; nothing where the browser keeps nothing, or something else. Ids of another house find no kit and count for nothing. */
export function readChoice(): Choice {
  try {
    return choiceSchema.parse(JSON.parse(localStorage.getItem(KEY) ?? '{}'));
  } catch {
    return {};
  }
}
