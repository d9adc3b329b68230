import { useSyncExternalStore } from 'react';

/** One value that components may listen to. Telling it what it knows already wakes nobody. */
export class ValueStore<Value> {
  private readonly listeners = new Set<() => void>();

  constructor(
    private value: Value,
    private readonly isSame: (a: Value, b: Value) => boolean = Object.is,
  ) {}

  readonly get = (): Value => this.value;

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  set(next: Value): void {
    if (this.isSame(this.value, next)) return;
    this.value = next;
    for (const listener of [...this.listeners]) listener();
  }
}

type Primitive = string | number | boolean | null | undefined;

export function useStored<Value>(store: ValueStore<Value>): Value {
  return useSyncExternalStore(store.subscribe, store.get);
}

/** Only what `pick` makes of the value wakes the component: it must be a primitive, so that a new object is no change. */
export function useStoredPart<Value, Part extends Primitive>(
  store: ValueStore<Value>,
  pick: (value: Value) => Part,
): Part {
  return useSyncExternalStore(store.subscribe, () => pick(store.get()));
}

/** Equal when every own member is. */
export function isShallowSame<Value extends object>(a: Value, b: Value): boolean {
  const keys = Object.keys(a) as (keyof Value)[];
  return keys.length === Object.keys(b).length && keys.every((key) => Object.is(a[key], b[key]));
}
