export type PedalAct = 'next' | 'back';

/** What the pedal of this station was seen to send, by its key. It goes before what is usual. */
export type PedalBinding = Readonly<Record<string, PedalAct>>;

/** Page-turn pedals and clickers are keyboards, and each maker sends other keys. */
const usual: PedalBinding = {
  PageDown: 'next',
  ArrowRight: 'next',
  ArrowDown: 'next',
  ' ': 'next',
  Enter: 'next',
  PageUp: 'back',
  ArrowLeft: 'back',
  ArrowUp: 'back',
};

/** Keys that the browser or the keyboard itself needs, and that no press can be told from. */
const unlearnable = new Set([
  'Tab',
  'Escape',
  'Shift',
  'Control',
  'Alt',
  'AltGraph',
  'Meta',
  'CapsLock',
  'NumLock',
  'Fn',
  'Dead',
  'Process',
  'Unidentified',
]);

export function isLearnable(key: string): boolean {
  return !unlearnable.has(key);
}

/** The binding once this key does that act: each act has one learned key, and a key one act. */
export function withLearned(binding: PedalBinding, act: PedalAct, key: string): PedalBinding {
  const others = Object.entries(binding).filter(([known, does]) => known !== key && does !== act);
  return { ...Object.fromEntries(others), [key]: act };
}

/** Writes nothing and moves nothing in a field. */
const harmlessInField = /^(PageDown|Media|Audio|Browser|Launch|F\d)/;

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
export function pedalActOf(input: PedalKey, learned: PedalBinding = {}): PedalAct | null {
  const act = learned[input.key] ?? usual[input.key];
  if (!act || input.hasModifier) return null;
  if (input.isDialogOpen && !(input.isAlertStanding && act === 'next')) return null;
  if (input.isTyping && !(input.isAlertStanding && harmlessInField.test(input.key))) return null;
  const isPressKey = input.key === ' ' || input.key === 'Enter';
  if (isPressKey && input.isOnTabbedControl) return null;
  if (input.key.startsWith('Arrow') && input.isOnTabbedChoice) return null;
  return act;
}
