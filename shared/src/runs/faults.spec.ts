import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { LogBuilder, MEMBER_ID, RUN_ID, START_MS } from '../testing/index.js';
import type { RunEvent } from './events.js';
import { faultEvents, RECALL_MS } from './faults.js';
import { foldRun } from './fold.js';

const KEY = 'hub:tablet-a';

/** A tablet that looks once a second at whether the hub is there. */
class Watcher {
  readonly log = new LogBuilder();
  private second = 0;
  private isTrue = false;
  private sinceS = 0;

  constructor(private readonly station = 'tablet-a') {}

  get nowMs(): number {
    return START_MS + this.second * 1000;
  }

  see(isTrue: boolean, forS: number): this {
    for (let i = 0; i < forS; i += 1) {
      this.second += 1;
      if (isTrue !== this.isTrue) Object.assign(this, { isTrue, sinceS: this.second });
      const heldMs = (this.second - this.sinceS) * 1000;
      const sight = {
        rule: 'hub',
        key: KEY,
        isTrue,
        heldMs,
        onDelayMs: 10_000,
        offDelayMs: 2_000,
        stepId: null,
      } as const;
      const place = { runId: RUN_ID, station: this.station, nowMs: this.nowMs };
      this.log.entries.push(...faultEvents(foldRun(this.log.entries), sight, place));
    }
    return this;
  }

  person(type: 'alert.acknowledged' | 'alert.shelved', crossing: number, untilMs = 0): this {
    const at = { atMs: this.nowMs, by: MEMBER_ID };
    if (type === 'alert.acknowledged') this.log.add(type, { key: KEY, crossing, stage: 'now' }, at);
    else this.log.add(type, { key: KEY, crossing, untilMs, reason: 'known' }, at);
    return this;
  }

  get told(): string[] {
    const words = { 'alert.raised': 'on', 'alert.cleared': 'off' } as Record<RunEvent['type'], string>;
    return this.log.entries.flatMap(({ type, atMs }) =>
      words[type] ? `${words[type]} ${(atMs - START_MS) / 1000}` : [],
    );
  }
}

describe(faultEvents, () => {
  it('waits before it calls and before it is over', () => {
    expect(new Watcher().see(false, 5).see(true, 9).see(false, 5).told).toEqual([]);
    expect(new Watcher().see(true, 15).see(false, 1).see(true, 3).see(false, 5).told).toEqual(['on 11', 'off 22']);
  });

  it('calls again when it was heard five minutes ago and is still true', () => {
    const heard = new Watcher().see(true, 20).person('alert.acknowledged', 1);
    expect(heard.see(true, RECALL_MS / 1000 - 1).told).toEqual(['on 11']);
    expect(heard.see(true, 1).told).toEqual(['on 11', 'on 320']);
    expect(foldRun(heard.log.entries).alerts.filter(({ isStanding }) => isStanding)).toMatchObject([{ crossing: 2 }]);
    expect(heard.see(false, 3).told.slice(2)).toEqual(['off 323', 'off 323']);
  });

  it('comes back by itself when it was put aside until then', () => {
    const aside = new Watcher().see(true, 20);
    aside.person('alert.shelved', 1, aside.nowMs + 60_000).see(true, 59);
    expect(aside.told).toEqual(['on 11']);
    expect(aside.see(true, 1).told).toEqual(['on 11', 'on 80']);
  });

  it('is held when it came and went three times in a minute, until it has been away for a minute', () => {
    const loose = new Watcher().see(true, 11).see(false, 4).see(true, 12).see(false, 4).see(true, 12);
    expect(loose.told.filter((word) => word.startsWith('on'))).toHaveLength(3);
    const before = loose.told.length;
    expect(loose.see(false, 59).see(true, 2).see(false, 60).told).toHaveLength(before);
    expect(loose.see(false, 2).told).toHaveLength(before + 1);
  });

  it('however it flickers: on and off by turns, never four calls in a minute, and two devices write the same ids', () => {
    const spans = fc.array(fc.record({ isTrue: fc.boolean(), forS: fc.integer({ min: 1, max: 40 }) }), {
      maxLength: 25,
    });
    fc.assert(
      fc.property(spans, (list) => {
        const [one, two] = [new Watcher('one'), new Watcher('two')].map((watcher) => {
          for (const { isTrue, forS } of list) watcher.see(isTrue, forS);
          return watcher;
        });
        const kinds = one!.told.map((word) => word.slice(0, 2));
        expect(kinds.every((kind, index) => kind === (index % 2 === 0 ? 'on' : 'of'))).toBe(true);
        const onsS = one!.told.filter((word) => word.startsWith('on')).map((word) => Number(word.slice(3)));
        expect(onsS.every((onS, index) => (onsS[index + 3] ?? Infinity) - onS > 60)).toBe(true);
        const idsOf = ({ log }: Watcher) => log.entries.map(({ id }) => id);
        expect(idsOf(one!)).toEqual(idsOf(two!));
      }),
      { numRuns: 40 },
    );
  });
});
