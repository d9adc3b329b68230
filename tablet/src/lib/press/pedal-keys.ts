export type PedalAct = 'next' | 'back';

/** Page-turn pedals and clickers are keyboards, and each maker sends other keys. */
const acts: Record<string, PedalAct> = {
  PageDown: 'next',
  ArrowRight: 'next',
  ArrowDown: 'next',
  ' ': 'next',
  Enter: 'next',
  PageUp: 'back',
  ArrowLeft: 'back',
  ArrowUp: 'back',
};

export interface PedalKey {
  key: string;
  hasModifier: boolean;
  /** Somebody types into a field. */
  isTyping: boolean;
  /** A dialog is open: keys belong to it alone, … */
  isDialogOpen: boolean;
  /** … but for the one that says "heard it" to an alert. */
  isAlertStanding: boolean;
  /** Somebody went to a button with Tab: Space and Enter press that button. */
  isOnTabbedControl: boolean;
  /** … or to a choice, where the arrows choose. */
  isOnTabbedChoice: boolean;
}

/** What a key does on the run sheet; `null`: it is none of ours and goes where it goes. */
export function pedalActOf(input: PedalKey): PedalAct | null {
  const act = acts[input.key];
  if (!act || input.hasModifier) return null;
  if (input.isDialogOpen && !(input.isAlertStanding && act === 'next')) return null;
  // In a field, only a key that writes nothing and moves nothing can be a pedal.
  if (input.isTyping && !(input.isAlertStanding && input.key === 'PageDown')) return null;
  const isPressKey = input.key === ' ' || input.key === 'Enter';
  if (isPressKey && input.isOnTabbedControl) return null;
  if (input.key.startsWith('Arrow') && input.isOnTabbedChoice) return null;
  return act;
}
