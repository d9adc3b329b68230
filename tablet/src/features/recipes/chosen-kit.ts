import { z } from 'zod';
import { keepValue, readKeptAs } from '#lib/kept.ts';
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
  keepValue(KEY, choice);
}

/** As it was kept; nothing where the browser keeps nothing, or something else. Ids of another house find no kit and count for nothing. */
export function readChoice(): Choice {
  return readKeptAs(choiceSchema, KEY) ?? {};
}
