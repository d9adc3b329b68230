import { ValueStore } from '../value-store.ts';
import { isLearnable, withLearned, type PedalAct, type PedalBinding } from './pedal-keys.ts';

const KEY = 'steepfall.pedal';

function readKept(): PedalBinding {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? '{}');
    const entries = Object.entries(kept ?? {}).filter(([key, act]) => isLearnable(key) && isAct(act));
    return Object.fromEntries(entries) as PedalBinding;
  } catch {
    return {};
  }
}

function isAct(act: unknown): act is PedalAct {
  return act === 'next' || act === 'back';
}

function keep(binding: PedalBinding): void {
  pedalBinding.set(binding);
  try {
    localStorage.setItem(KEY, JSON.stringify(binding));
  } catch {
    // It holds until the page is closed.
  }
}

/** What the pedal of this station was taught. */
export const pedalBinding = new ValueStore<PedalBinding>(readKept());

/** False for a key that cannot be a pedal's. */
export function learnPedal(act: PedalAct, key: string): boolean {
  if (!isLearnable(key)) return false;
  keep(withLearned(pedalBinding.get(), act, key));
  return true;
}

export function forgetPedal(): void {
  keep({});
}

const names: Record<string, string> = {
  ' ': 'Space',
  ArrowRight: 'right arrow',
  ArrowLeft: 'left arrow',
  ArrowUp: 'up arrow',
  ArrowDown: 'down arrow',
  PageDown: 'page down',
  PageUp: 'page up',
};

/** A key as a person calls it. */
export function keyName(key: string): string {
  return names[key] ?? (key.length === 1 ? key.toUpperCase() : key.replace(/(?<=[a-z])(?=[A-Z])/g, ' ').toLowerCase());
}
