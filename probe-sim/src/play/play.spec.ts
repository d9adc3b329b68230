import type { Reading } from '@steepfall/shared/readings';
import { describe, expect, it } from 'vitest';
import { impatientClock, runClockPace, wallPace } from '../clock/index.js';
import { faultyLine } from '../faults/index.js';
import { defaultKettle, kettleRun } from '../kettle/index.js';
import type { Sink } from '../transport/forwarder.js';
import { DAY, followScript, scriptFromText } from './act-script.js';
import { play } from './play.js';
import { kettleSource, traceSource } from './source.js';
import { readTrace } from './trace.js';

const startMs = 1_760_000_000_000;

function collect(): Sink & { offered: Reading[] } {
  const offered: Reading[] = [];
  return {
    offered,
    offer: (readings) => void offered.push(...readings),
    delivered: () => Promise.resolve(true),
    failure: null,
    close: () => undefined,
  };
}

describe(readTrace, () => {
  it('reads seconds and degrees, and "no signal"', () => {
    expect(readTrace('seconds,celsius\n0.00,83.5\r\n1.10,-127.0\n2.20,\n\n')).toEqual([
      { atMs: 0, tempC: 83.5 },
      { atMs: 1100, tempC: -127 },
      { atMs: 2200, tempC: null },
    ]);
  });

  it.each([
    ['time,temp\n0,1', 'line 1 is not the heading "seconds,celsius"'],
    ['seconds,celsius\n0,70\nabc,70', 'line 3 is not "seconds,celsius": abc,70'],
    ['seconds,celsius\n0,hot', 'line 2'],
    ['seconds,celsius\n-1,70', 'line 2'],
    ['seconds,celsius\n1', 'line 2'],
    ['seconds,celsius\n1,70,C', 'line 2'],
    ['seconds,celsius\n', 'it has no readings'],
  ])('says where %j goes wrong', (text, message) => {
    expect(() => readTrace(text)).toThrow(message);
  });
});

describe(play, () => {
  const trace = readTrace('seconds,celsius\n0,70\n10,69\n20,68\n15,68.5\n30,67\n');
  const playWith = async (rate: number) => {
    const sink = collect();
    const clock = impatientClock(startMs);
    const pace = wallPace(startMs, rate);
    const { signal } = new AbortController();
    await play({ source: traceSource(trace), line: faultyLine(), sink, clock, pace: () => pace, signal });
    return { sink, clock };
  };

  it('stamps with the wall clock, squeezed at a rate, in the order of the file', async () => {
    const { sink, clock } = await playWith(20);
    expect(sink.offered.map(({ atMs }) => atMs - startMs)).toEqual([0, 500, 1000, 750, 1500]);
    expect(clock.nowMs()).toBe(startMs + 1500);
  });

  it('on a run clock keeps the spacing, and follows when the rate changes', async () => {
    const sink = collect();
    const clock = impatientClock(startMs);
    const slow = { anchorWallMs: startMs, anchorRunMs: startMs, rate: 10 };
    const fast = { anchorWallMs: startMs + 1500, anchorRunMs: startMs + 15_000, rate: 60 };
    const pace = () => runClockPace(clock.nowMs() < startMs + 1500 ? slow : fast, startMs);
    const { signal } = new AbortController();
    await play({ source: traceSource(trace), line: faultyLine(), sink, clock, pace, signal });
    expect(sink.offered.map(({ atMs }) => atMs - startMs)).toEqual([0, 10_000, 20_000, 15_000, 30_000]);
    expect(clock.nowMs() - startMs).toBeGreaterThanOrEqual(1750);
    expect(clock.nowMs() - startMs).toBeLessThan(2100);
  });

  it('stops when told, and when the sink fails', async () => {
    const stopped = new AbortController();
    const sink = collect();
    const clock = impatientClock(startMs);
    const whole = { source: traceSource(trace), line: faultyLine(), clock, pace: () => wallPace(startMs, 1) };
    sink.offer = (readings) => {
      sink.offered.push(...readings);
      if (sink.offered.length === 2) stopped.abort();
    };
    await play({ ...whole, sink, signal: stopped.signal });
    expect(sink.offered).toHaveLength(2);
    const failed = { ...collect(), failure: new Error('no') };
    await play({ ...whole, sink: failed, signal: new AbortController().signal });
    expect(failed.offered).toEqual([]);
  });
});

describe('a script', () => {
  it('does each act once, in order, at its time, after the one before, or at its temperature', () => {
    const script = followScript(scriptFromText('heat@10,coil@76C,tea-in@+10s,hops-in@62C'));
    expect(script.due(9000, 20)).toEqual([]);
    expect(script.due(12_000, 20)).toEqual([{ act: 'heat-on', dueMs: 10_000 }]);
    expect(script.due(13_000, 75.9)).toEqual([]);
    expect(script.due(14_000, 76)).toEqual([{ act: 'coil-in', dueMs: 14_000 }]);
    expect(script.due(23_000, 75)).toEqual([]);
    expect(script.due(25_000, 75)).toEqual([{ act: 'tea-in', dueMs: 24_000 }]);
    expect(script.isDone).toBe(false);
    expect(script.due(30_000, 61.9)).toEqual([{ act: 'hops-in', dueMs: 30_000 }]);
    expect(script.isDone).toBe(true);
    expect(script.due(90_000, 20)).toEqual([]);
  });

  it('knows short names, cold water and a whole day', () => {
    const acts = (text: string) => scriptFromText(text).map(({ act }) => act);
    expect(acts('chiller@0,stir@1m,cold-water@20m=2,cold-water@+5s')).toEqual([
      'chiller-on',
      'stirred',
      { act: 'cold-water', massKg: 2 },
      { act: 'cold-water', massKg: 1 },
    ]);
    expect(scriptFromText('day')).toEqual(scriptFromText(DAY));
  });

  it.each([
    ['heat', 'is no act. Write act@when'],
    ['boil@0', 'There is no act "boil". Known: heat-on, heat-off'],
    ['heat@soon', '"soon" is no duration'],
    ['heat@0=3', 'only cold-water has an amount'],
    ['cold-water@0=-1', 'how many kg?'],
  ])('says what is wrong with %s', (text, message) => {
    expect(() => scriptFromText(text)).toThrow(message);
  });

  it('drives a kettle through a day: up to the steep, hops on the fall, and cool', () => {
    const run = kettleRun(defaultKettle(), 0);
    const script = followScript(scriptFromText('day'));
    const source = kettleSource(run, script, 3 * 3600 * 1000);
    const readings: Reading[] = [];
    while (!script.isDone) readings.push(...source.take(readings.length * 1000));
    const highest = Math.max(...readings.map(({ tempC }) => tempC ?? 0));
    expect(highest).toBeGreaterThan(75);
    expect(highest).toBeLessThan(77);
    expect(run.state.tempC).toBeLessThan(20.1);
    expect(run.state.isHopsIn || run.state.isTeaIn || run.state.isHeatOn || run.state.isChillerOn).toBe(false);
  });

  it('ends a kettle at its last instant', () => {
    const source = kettleSource(kettleRun(defaultKettle(), 0), followScript([]), 2500);
    expect(source.take(10_000)).toHaveLength(3);
    expect(source.nextMs()).toBeNull();
  });
});
