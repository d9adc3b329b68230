import type { Reading } from '@steepfall/shared/readings';
import { describe, expect, it } from 'vitest';
import { fault, faultKinds, faultyLine, withFaults } from './fault.js';
import { faultFromText } from './fault-text.js';

const steady: Reading[] = Array.from({ length: 60 }, (_, i) => ({ atMs: i * 1000, tempC: 70 }));
const seconds = (readings: Reading[]) => readings.map((reading) => reading.atMs / 1000);

describe('faults', () => {
  it('leaves everything before and after as it was', () => {
    for (const kind of faultKinds) {
      const out = withFaults(steady, [fault(kind, 20_000, { durationMs: 10_000 })]);
      expect(out.slice(0, 20), kind).toEqual(steady.slice(0, 20));
      if (kind !== 'drift') expect(out.slice(-20), kind).toEqual(steady.slice(-20));
    }
  });

  it('dropout: nothing comes for its duration', () => {
    const out = withFaults(steady, [faultFromText('dropout@20s+10s')]);
    expect(seconds(out)).toEqual(seconds(steady).filter((s) => s < 20 || s >= 30));
  });

  it('open wire: -127 for its duration', () => {
    const out = withFaults(steady, [faultFromText('open-wire@20s+3s')]);
    expect(out.filter(({ tempC }) => tempC === -127).map(({ atMs }) => atMs)).toEqual([20_000, 21_000, 22_000]);
  });

  it('power-on: one 85.0, also when no reading falls on the instant', () => {
    const out = withFaults(steady, [faultFromText('power-on@20.5s')]);
    expect(out.filter(({ tempC }) => tempC === 85)).toEqual([{ atMs: 21_000, tempC: 85 }]);
  });

  it('spike: one reading off by the amount, or one in five of a spell', () => {
    const single = withFaults(steady, [faultFromText('spike@20s=6')]);
    expect(single.filter(({ tempC }) => tempC !== 70)).toHaveLength(1);
    expect(Math.abs(single[20]!.tempC! - 70)).toBe(6);
    const long = Array.from({ length: 1000 }, (_, i) => ({ atMs: i * 1000, tempC: 70 }));
    const hit = withFaults(long, [faultFromText('spike@0+1000s')], 4).filter(({ tempC }) => tempC !== 70);
    expect(hit.length).toBeGreaterThan(150);
    expect(hit.length).toBeLessThan(250);
    expect(new Set(hit.map(({ tempC }) => tempC))).toEqual(new Set([62, 78]));
  });

  it('drift: creeps, then stays', () => {
    const out = withFaults(steady, [faultFromText('drift@10s+30s=1.2')]);
    expect(out[10]!.tempC).toBe(70);
    expect(out[25]!.tempC).toBeCloseTo(70.3);
    expect(out[40]!.tempC).toBeCloseTo(70.6);
    expect(out[59]!.tempC).toBeCloseTo(70.6);
  });

  it('duplicate: each reading twice', () => {
    expect(seconds(withFaults(steady, [faultFromText('duplicate@57s')]))).toEqual(
      [...seconds(steady), 57, 58, 59].sort((a, b) => a - b),
    );
  });

  it('late: every other reading behind newer ones, none lost', () => {
    const out = seconds(withFaults(steady, [faultFromText('late@20s+10s=3')]));
    expect(out).not.toEqual(seconds(steady));
    expect([...out].sort((a, b) => a - b)).toEqual(seconds(steady));
    expect(out.indexOf(20)).toBeGreaterThan(out.indexOf(23));
  });

  it('late: hands out at the end what is still held back', () => {
    expect(seconds(withFaults(steady, [faultFromText('late@50s+20s=60')])).sort((a, b) => a - b)).toEqual(
      seconds(steady),
    );
  });

  it('several at once, in the order told, and more while it runs', () => {
    const line = faultyLine([faultFromText('drift@0+60s=60')]);
    expect(line.pass(steady[1]!)).toEqual([{ atMs: 1000, tempC: 71 }]);
    line.add(fault('duplicate', 2000));
    expect(line.pass(steady[2]!)).toEqual([
      { atMs: 2000, tempC: 72 },
      { atMs: 2000, tempC: 72 },
    ]);
  });

  it('keeps "no signal" as it is', () => {
    const silent = [{ atMs: 0, tempC: null }];
    expect(withFaults(silent, [fault('drift', 0), fault('spike', 0)])).toEqual(silent);
  });

  it('is the same for the same seed', () => {
    const spell = [faultFromText('spike@0+60s')];
    expect(withFaults(steady, spell, 9)).toEqual(withFaults(steady, spell, 9));
    expect(withFaults(steady, spell, 9)).not.toEqual(withFaults(steady, spell, 10));
  });
});

describe(faultFromText, () => {
  it('reads kind, start, duration and amount', () => {
    expect(faultFromText('dropout@120s+20s')).toEqual({
      kind: 'dropout',
      fromMs: 120_000,
      durationMs: 20_000,
      amount: 0,
    });
    expect(faultFromText('open-wire@1m30s+1m=-254')).toEqual({
      kind: 'open-wire',
      fromMs: 90_000,
      durationMs: 60_000,
      amount: -254,
    });
    expect(faultFromText('power-on@2m')).toEqual({ kind: 'power-on', fromMs: 120_000, durationMs: 0, amount: 85 });
  });

  it.each([
    ['dropuot@120s', 'There is no fault "dropuot". Known: dropout, open-wire'],
    ['dropout', 'is no fault. Write kind@from'],
    ['dropout@soon', '"soon" is no duration'],
    ['spike@10s=much', '"much" in "spike@10s=much" is no number'],
  ])('says what is wrong with %s', (text, message) => {
    expect(() => faultFromText(text)).toThrow(message);
  });
});
