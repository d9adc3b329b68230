/** The four sounds of an alarm: a soft double, a rising triple, the insistent five, and the same higher and faster when nobody answers. */
export type AlarmLevel = 'coming-up' | 'stand-by' | 'now' | 'urgent';

/** Between the tone and the words, s; a tone leads its text by half a second at most. */
const PAUSE_S = 0.4;
/** Between two bursts of an insistent tone, s; nearer together they can no longer be told apart. */
const LEAST_GAP_S = 2.5;
/** What is quieter than this at the end of a recording is silence. */
const SILENCE = 0.004;

interface Turn {
  /** From start to start, s, at least. With words in it, this is also how far apart they are said: 5 to 10 s. */
  everyS: number;
  /** How often the words are said in one turn, and the rest between, s. */
  wordCount: 1 | 2;
  restS: number;
  isLooped: boolean;
}

const turns: Record<AlarmLevel, Turn> = {
  'coming-up': { everyS: 0, wordCount: 2, restS: 5, isLooped: false },
  'stand-by': { everyS: 10, wordCount: 1, restS: 1, isLooped: true },
  now: { everyS: 8, wordCount: 1, restS: 0.6, isLooped: true },
  urgent: { everyS: 5, wordCount: 1, restS: 0.6, isLooped: true },
};

/** Whether an alarm goes on by itself until somebody answers. */
export function isLooped(level: AlarmLevel): boolean {
  return turns[level].isLooped;
}

function soundingLength(samples: Float32Array): number {
  let end = samples.length;
  while (end > 0 && Math.abs(samples[end - 1] ?? 0) < SILENCE) end -= 1;
  return end;
}

/**
 * One turn of an alarm as one piece of sound: its tone, a breath, the words. Looped by the audio thread it goes on in a hidden tab whose
 * timers are held back. Without words it is the tone alone, in the same turn.
 */
export function composeRing(
  context: BaseAudioContext,
  level: AlarmLevel,
  tone: AudioBuffer,
  words: readonly AudioBuffer[],
): AudioBuffer {
  const turn = turns[level];
  const rate = context.sampleRate;
  const samplesIn = (seconds: number) => Math.round(seconds * rate);
  const toneSamples = tone.getChannelData(0);
  const toneLength = soundingLength(toneSamples);
  const parts = [{ at: 0, samples: toneSamples.subarray(0, toneLength) }];
  let at = toneLength;
  for (let time = 0; words.length > 0 && time < turn.wordCount; time += 1) {
    at += samplesIn(time === 0 ? PAUSE_S : turn.restS);
    for (const word of words) {
      parts.push({ at, samples: word.getChannelData(0) });
      at += word.length;
    }
  }
  const least = turn.isLooped ? Math.max(at + samplesIn(turn.restS), toneLength + samplesIn(LEAST_GAP_S)) : at;
  const buffer = context.createBuffer(1, Math.max(least, samplesIn(turn.everyS)), rate);
  const whole = buffer.getChannelData(0);
  for (const part of parts) whole.set(part.samples, part.at);
  return buffer;
}
