import type { Tab } from './devtools.ts';

/** A sound that was put on the audio clock. */
export interface Sound {
  /** Wall time at which it begins, epoch ms. */
  atMs: number;
  durationS: number;
  loop: boolean;
  /** Tones and clips that are in it, in order, with their place in s. */
  parts: { name: string; atS: number }[];
  /** Wall time at which it was told to end; null while it goes on. */
  stoppedAtMs: number | null;
}

/**
 * Listens to the audio graph from before the page's own first line: which sounds were started, what is in them, and how loud the output is.
 * Runs in the page, on nothing but its text.
 */
export function installEars(): void {
  const ears = { sounds: [] as Sound[], contexts: [] as AudioContext[], states: [] as string[] };
  Object.assign(globalThis, { ears });
  const urls = new WeakMap<ArrayBuffer, string>();
  const clips = new Map<string, Float32Array>();
  const analysers = new WeakMap<BaseAudioContext, AnalyserNode>();

  const arrayBuffer = Response.prototype.arrayBuffer;
  Response.prototype.arrayBuffer = async function (this: Response) {
    const buffer = await arrayBuffer.call(this);
    urls.set(buffer, this.url);
    return buffer;
  };
  const decode = BaseAudioContext.prototype.decodeAudioData;
  BaseAudioContext.prototype.decodeAudioData = async function (this: BaseAudioContext, data: ArrayBuffer, ...rest: []) {
    // A tone and a word may be called alike: "now" is both.
    const [, folder, file] = urls.get(data)?.match(/(sounds|speech)\/([^/]+)\.(?:mp3|wav)$/) ?? [];
    const name = file && (folder === 'sounds' ? `tone ${file}` : file);
    const decoded = await decode.call(this, data, ...rest);
    if (name) clips.set(name, decoded.getChannelData(0));
    return decoded;
  };
  const connect = AudioNode.prototype.connect as (this: AudioNode, target: AudioNode) => AudioNode;
  AudioNode.prototype.connect = function (this: AudioNode, target: AudioNode) {
    if (target === this.context.destination) {
      let analyser = analysers.get(this.context);
      if (!analyser) {
        analyser = new AnalyserNode(this.context, { fftSize: 4096 });
        analysers.set(this.context, analyser);
        ears.contexts.push(this.context as AudioContext);
        ears.states.push(this.context.state);
      }
      connect.call(this, analyser);
    }
    return connect.call(this, target);
  } as typeof AudioNode.prototype.connect;

  /** Where a stretch of a clip lies in a longer piece, in samples; -1 when it does not. */
  const placeOf = (clip: Float32Array, whole: Float32Array): number => {
    const from = clip.findIndex((sample) => Math.abs(sample) > 0.05);
    if (from < 0) return -1;
    const needle = clip.subarray(from, from + 400);
    for (let at = 0; at + needle.length < whole.length; at += 1) {
      if (whole[at] !== needle[0]) continue;
      let same = 1;
      while (same < needle.length && whole[at + same] === needle[same]) same += 1;
      if (same === needle.length) return at - from;
    }
    return -1;
  };
  const sounds = new WeakMap<AudioScheduledSourceNode, Sound>();
  const start = AudioBufferSourceNode.prototype.start;
  AudioBufferSourceNode.prototype.start = function (this: AudioBufferSourceNode, when = 0) {
    const { buffer, context } = this;
    // What keeps an output warm, or unlocks it, is no sound.
    if (buffer && buffer.duration > 0.05 && buffer.getChannelData(0).some((sample) => Math.abs(sample) > 0.01)) {
      const whole = buffer.getChannelData(0);
      const parts = [...clips]
        .map(([name, clip]) => ({ name, atS: placeOf(clip, whole) / buffer.sampleRate }))
        .filter(({ atS }) => atS >= 0)
        .sort((a, b) => a.atS - b.atS);
      const atMs = Date.now() + Math.max(0, when - context.currentTime) * 1000;
      const sound = { atMs, durationS: buffer.duration, loop: this.loop, parts, stoppedAtMs: null };
      sounds.set(this, sound);
      ears.sounds.push(sound);
    }
    start.call(this, when);
  };
  const stop = AudioScheduledSourceNode.prototype.stop;
  AudioBufferSourceNode.prototype.stop = function (this: AudioBufferSourceNode, when = 0) {
    const sound = sounds.get(this);
    if (sound) sound.stoppedAtMs ??= Date.now();
    stop.call(this, when);
  };
  Object.assign(ears, {
    loudness: () =>
      Math.max(
        0,
        ...ears.contexts.map((context) => {
          const samples = new Float32Array(4096);
          analysers.get(context)?.getFloatTimeDomainData(samples);
          return Math.sqrt(samples.reduce((sum, sample) => sum + sample * sample, 0) / samples.length);
        }),
      ),
  });
}

export const earsScript = `(${installEars.toString()})();`;

export async function soundsOf(tab: Tab): Promise<Sound[]> {
  return tab.look<Sound[]>('globalThis.ears?.sounds ?? []');
}

/** Sounds that were begun and not taken back before their moment. */
export async function heardOf(tab: Tab): Promise<Sound[]> {
  const nowMs = Date.now();
  return (await soundsOf(tab)).filter(({ atMs, stoppedAtMs }) => atMs <= nowMs && (stoppedAtMs ?? Infinity) > atMs);
}

/** Root mean square at the output, the loudest of a while. */
export async function loudest(tab: Tab, forMs: number): Promise<number> {
  const untilMs = Date.now() + forMs;
  let most = 0;
  while (Date.now() < untilMs) {
    most = Math.max(most, await tab.look<number>('globalThis.ears?.loudness() ?? 0'));
    await new Promise((passed) => setTimeout(passed, 40));
  }
  return most;
}

export const wordsOf = ({ parts }: Sound): string[] => parts.map(({ name }) => name);
