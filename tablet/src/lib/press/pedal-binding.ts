import { z } from 'zod';
import { keepValue, readKeptAs } from '../kept.ts';
import { ValueStore } from '../value-store.ts';
import { isLearnable, withLearned, type PedalAct, type PedalBinding } from './pedal-keys.ts';

const KEY = 'steepfall.pedal';

function readBinding(): PedalBinding {
  const entries = Object.entries(readKeptAs(z.record(z.string(), z.unknown()), KEY) ?? {});
  return Object.fromEntries(entries.filter(([key, act]) => isLearnable(key) && isAct(act))) as PedalBinding;
}

function isAct(act: unknown): act is PedalAct {
  return act === 'next' || act === 'back';
}

function choose(binding: PedalBinding): void {
  pedalBinding.set(binding);
  keepValue(KEY, binding);
}

/** What the pedal of this station was taught. */
export const pedalBinding = new ValueStore<PedalBinding>(readBinding());

/** False for a key that cannot be a pedal's. */
export function learnPedal(act: PedalAct, key: string): boolean {
  if (!isLearnable(key)) return false;
  choose(withLearned(pedalBinding.get(), act, key));
  return true;
}

export function forgetPedal(): void {
  choose({});
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
