import type { AlarmLevel } from './alarm-sounds.ts';

/** Between the tone and the words, s; a tone leads its text by half a second at most. */
const PAUSE_S = 0.4;
/** What is quieter than this at the end of a recording is silence. */
const SILENCE = 0.004;

/** How an alarm goes on: `everyS` from start to start, at least; how often the words are said in one turn; whether it begins again. */
const turns: Record<AlarmLevel, { everyS: number; wordCount: 1 | 2; restS: number; isLooped: boolean }> = {
  'coming-up': { everyS: 0, wordCount: 2, restS: 5, isLooped: false },
  'stand-by': { everyS: 10, wordCount: 1, restS: 1, isLooped: true },
  now: { everyS: 5.4, wordCount: 1, restS: 0.6, isLooped: true },
};

export interface ComposedRing {
  buffer: AudioBuffer;
  isLooped: boolean;
}

function soundingLength(samples: Float32Array): number {
  let end = samples.length;
  while (end > 0 && Math.abs(samples[end - 1] ?? 0) < SILENCE) end -= 1;
  return end;
}

/**
 * One turn of an alarm as one piece of sound: its tone, a breath, the words. Looped by the audio thread it goes on in a hidden tab whose
 * timers are held back.
 */
export function composeRing(
  context: BaseAudioContext,
  level: AlarmLevel,
  tone: AudioBuffer,
  words: readonly AudioBuffer[],
): ComposedRing {
  const { everyS, wordCount, restS, isLooped } = turns[level];
  const rate = context.sampleRate;
  const parts: { at: number; samples: Float32Array }[] = [];
  let at = 0;
  const put = (samples: Float32Array) => {
    parts.push({ at, samples });
    at += samples.length;
  };
  const toneSamples = tone.getChannelData(0);
  put(toneSamples.subarray(0, soundingLength(toneSamples)));
  at += Math.round(PAUSE_S * rate);
  for (let time = 0; time < wordCount; time += 1) {
    if (time > 0) at += Math.round(restS * rate);
    for (const word of words) put(word.getChannelData(0));
  }
  const length = Math.max(at + (isLooped ? Math.round(restS * rate) : 0), Math.round(everyS * rate));
  const buffer = context.createBuffer(1, length, rate);
  const whole = buffer.getChannelData(0);
  for (const part of parts) whole.set(part.samples, part.at);
  return { buffer, isLooped };
}
