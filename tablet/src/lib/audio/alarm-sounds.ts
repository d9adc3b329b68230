import { Howl, Howler } from 'howler';
import { subscribeTick } from '../clock/ticker.ts';
import { isShallowSame, ValueStore } from '../value-store.ts';
import { composeRing } from './compose-ring.ts';
import { SoundLibrary } from './sound-library.ts';
import { nextRepair, soundHealth, type AudioSigns, type ContextState, type SoundHealth } from './audio-health.ts';

/** The three families of tones: a soft double, a rising triple, the insistent five. */
export type AlarmLevel = 'coming-up' | 'stand-by' | 'now';

export interface Ring {
  level: AlarmLevel;
  /** Names what rings, so that the same alarm is not started twice. */
  id: string;
  /** Spoken clips after the tone, by name: "hops-in", "n62", "degrees". */
  say?: readonly string[];
}

export interface SoundState {
  /** `untested`: nobody has tapped since the page was loaded, so the browser keeps it silent. */
  health: SoundHealth | 'untested';
  /** What sounds at this moment. */
  ringing: string | null;
}

const LEVELS: readonly AlarmLevel[] = ['coming-up', 'stand-by', 'now'];
const STAND_BY_EVERY_MS = 10_000;
const CLOCK_LOOK_MS = 240;
/** Loud enough to keep an output alive, far below what anybody hears. */
const WARMTH = 1e-4;
const BUZZ: Record<AlarmLevel, number[]> = {
  'coming-up': [120],
  'stand-by': [160, 120, 160],
  now: [300, 120, 300, 120, 600],
};

const tonePath = (level: AlarmLevel) => `/sounds/${level}.wav`;
const clipPath = (clip: string) => `/speech/${clip}.mp3`;

/** Alarms through howler on Web Audio: one sound at a time, never queued on a locked context. */
class AlarmSounds {
  readonly state = new ValueStore<SoundState>({ health: 'untested', ringing: null }, isShallowSame);
  private howls: Record<AlarmLevel, Howl> | null = null;
  private wanted: Ring | null = null;
  private playing: Ring | null = null;
  private test: { level: AlarmLevel; soundId: number } | null = null;
  private lastStartMs = 0;
  private look: { contextS: number; atMs: number } | null = null;
  private isClockMoving = false;
  private triedCount = 0;
  private isRepairing = false;
  private hasLoadFailed = false;
  private warm: AudioBufferSourceNode | null = null;
  private spoken: AudioBufferSourceNode | null = null;
  private readonly library = new SoundLibrary();
  private isWarmWanted = false;

  /** Loads the sounds and starts to watch over the output. Silent until a tap. */
  start(): void {
    if (this.howls) return;
    // Howler's own suspending after 30 s would need a gesture to undo, its own unlocking throws the sounds away.
    Howler.autoSuspend = false;
    Howler.autoUnlock = false;
    this.load();
    subscribeTick(() => this.tick());
    const recover = () => void this.recover(false);
    document.addEventListener('visibilitychange', recover);
    addEventListener('pageshow', recover);
    addEventListener('focus', recover);
    addEventListener('pointerdown', () => void this.recover(true), { capture: true, passive: true });
    addEventListener('keydown', () => void this.recover(true), { capture: true, passive: true });
  }

  /** To be called inside a tap: browsers let sound out only then. */
  async unlock(): Promise<boolean> {
    this.start();
    const { audioSession } = navigator as { audioSession?: { type: string } };
    // On an iPad this is what lets an alarm past the silent switch.
    if (audioSession) audioSession.type = 'playback';
    const context = this.context;
    if (!context) return false;
    const silence = context.createBufferSource();
    silence.buffer = context.createBuffer(1, 1, context.sampleRate);
    silence.connect(context.destination);
    silence.start();
    if (this.hasLoadFailed) this.reload();
    const ready = Promise.all([context.resume(), this.loaded()]);
    await Promise.race([ready, new Promise((resolve) => setTimeout(resolve, 1_000))]);
    this.look = null;
    this.isClockMoving = context.state === 'running';
    this.judge();
    return this.state.get().health === 'fine';
  }

  /** What should ring from now on; `null` for silence. While sound is blocked it is only remembered. */
  ring(ring: Ring | null): void {
    this.wanted = ring;
    this.apply();
  }

  /** Makes the words of a run ready before they are needed; what is missing at its moment is left to the tone. */
  async prepareSpeech(clips: readonly string[]): Promise<void> {
    const { context } = this;
    if (!context) return;
    await this.library.load(context, [...LEVELS.map(tonePath), ...clips.map(clipPath)]);
  }

  /** Plays an alarm for the ear alone, as for the sound check. Nothing that rings for the run is touched by it. */
  playTest(level: AlarmLevel): void {
    this.stopTest();
    const soundId = this.state.get().health === 'fine' ? this.howls?.[level].play() : undefined;
    if (soundId !== undefined) this.test = { level, soundId };
  }

  stopTest(): void {
    if (this.test) this.howls?.[this.test.level].stop(this.test.soundId);
    this.test = null;
  }

  /** A loop nobody hears: some devices put an idle output to sleep for good. */
  keepWarm(isWanted: boolean): void {
    this.isWarmWanted = isWanted;
    this.applyWarmth();
  }

  private get context(): AudioContext | null {
    return (Howler.ctx as AudioContext | null) ?? null;
  }

  private load(): void {
    this.hasLoadFailed = false;
    const load = (level: AlarmLevel) => {
      const onLoad = () => {
        // Howler falls back to an audio element when it cannot fetch a file: nothing here would know whether that is heard.
        if ((howl as unknown as { _webAudio: boolean })._webAudio) this.judge();
        else onFail();
      };
      const onFail = () => {
        if (this.howls?.[level] !== howl) return;
        this.hasLoadFailed = true;
        this.judge();
      };
      const howl = new Howl({ src: [tonePath(level)], loop: level === 'now', html5: false });
      howl.once('load', onLoad);
      howl.once('loaderror', onFail);
      return howl;
    };
    this.howls = { 'coming-up': load('coming-up'), 'stand-by': load('stand-by'), now: load('now') };
    const { context } = this;
    if (context) context.onstatechange = () => void this.recover(false);
  }

  private get isLoaded(): boolean {
    const { howls } = this;
    return howls !== null && !this.hasLoadFailed && LEVELS.every((level) => howls[level].state() === 'loaded');
  }

  /** The files once more, after one of them did not come. */
  private reload(): void {
    this.playing = null;
    this.test = null;
    for (const level of LEVELS) this.howls?.[level].unload();
    this.howls = null;
    this.load();
  }

  private async loaded(): Promise<void> {
    while (!this.isLoaded && !this.hasLoadFailed) await new Promise((resolve) => setTimeout(resolve, 25));
  }

  private signs(): AudioSigns {
    const { context } = this;
    return { state: context ? (context.state as ContextState) : null, isClockMoving: this.isClockMoving };
  }

  private tick(): void {
    const { context } = this;
    const nowMs = performance.now();
    if (context) {
      if (!this.look) this.look = { contextS: context.currentTime, atMs: nowMs };
      else if (nowMs - this.look.atMs >= CLOCK_LOOK_MS) {
        this.isClockMoving = context.currentTime > this.look.contextS;
        this.look = { contextS: context.currentTime, atMs: nowMs };
      }
    }
    this.judge();
    const { playing } = this;
    if (playing?.level === 'stand-by' && !this.spoken && nowMs - this.lastStartMs >= STAND_BY_EVERY_MS)
      this.begin(playing);
  }

  private judge(): void {
    const before = this.state.get();
    const outputHealth = soundHealth(this.signs());
    if (outputHealth === 'fine') this.triedCount = 0;
    const health = outputHealth === 'fine' && !this.isLoaded ? 'blocked' : outputHealth;
    const hasBeenFine = before.health !== 'untested' || this.hasLoadFailed;
    this.state.set({ ...before, health: health === 'blocked' && !hasBeenFine ? 'untested' : health });
    if (health !== 'fine' && this.playing) this.halt();
    if (health === 'fine') this.applyWarmth();
    this.apply();
  }

  private apply(): void {
    const { wanted, playing } = this;
    if (wanted?.id === playing?.id && wanted?.level === playing?.level) return;
    if (wanted && this.state.get().health === 'fine') this.begin(wanted);
    else if (playing) this.halt();
  }

  /** Whatever sounded before stops without a word: listeners hear of the new one only. */
  private begin(ring: Ring): void {
    this.stopAll();
    this.playing = ring;
    this.lastStartMs = performance.now();
    if (!this.speak(ring)) this.howls?.[ring.level].play();
    (navigator as Partial<Navigator>).vibrate?.(BUZZ[ring.level]);
    this.state.set({ ...this.state.get(), ringing: ring.id });
  }

  /** Tone and words in one piece; false when there are no words, or not all of them have come. */
  private speak({ level, say = [] }: Ring): boolean {
    const { context } = this;
    const [tone] = this.library.take([tonePath(level)]) ?? [];
    const words = this.library.take(say.map(clipPath));
    if (!context || !tone || !words || words.length === 0) return false;
    const { buffer, isLooped } = composeRing(context, level, tone, words);
    const source = context.createBufferSource();
    source.buffer = buffer;
    source.loop = isLooped;
    source.connect(context.destination);
    source.start();
    this.spoken = source;
    return true;
  }

  private stopAll(): void {
    this.test = null;
    this.spoken?.stop();
    this.spoken = null;
    for (const level of LEVELS) this.howls?.[level].stop();
  }

  private halt(): void {
    this.stopAll();
    this.playing = null;
    (navigator as Partial<Navigator>).vibrate?.(0);
    this.state.set({ ...this.state.get(), ringing: null });
  }

  private async recover(isInTap: boolean): Promise<void> {
    const { context } = this;
    if (!context || this.isRepairing) return;
    if (isInTap && this.hasLoadFailed) this.reload();
    const repair = nextRepair(this.signs(), this.triedCount, isInTap);
    if (repair === 'none') return;
    this.isRepairing = true;
    this.triedCount += 1;
    try {
      if (repair === 'rebuild') this.rebuild();
      if (repair === 'suspend-and-resume') await briefly(context.suspend());
      await briefly(this.context?.resume());
    } catch {
      // The next tap tries the next rung.
    } finally {
      this.isRepairing = false;
      this.judge();
    }
  }

  private rebuild(): void {
    this.warm = null;
    this.spoken = null;
    this.playing = null;
    this.test = null;
    Howler.unload();
    this.load();
  }

  private applyWarmth(): void {
    const { context } = this;
    if (!this.isWarmWanted) {
      this.warm?.stop();
      this.warm = null;
      return;
    }
    if (this.warm || context?.state !== 'running') return;
    const buffer = context.createBuffer(1, context.sampleRate, context.sampleRate);
    const samples = buffer.getChannelData(0);
    for (let i = 0; i < samples.length; i += 1)
      samples[i] = WARMTH * Math.sin((2 * Math.PI * 40 * i) / context.sampleRate);
    const source = context.createBufferSource();
    source.buffer = buffer;
    source.loop = true;
    source.connect(context.destination);
    source.start();
    this.warm = source;
  }
}

/** A locked context never answers: no waiting for it. */
function briefly(work: Promise<void> | undefined): Promise<unknown> {
  return Promise.race([work, new Promise((resolve) => setTimeout(resolve, 500))]);
}

export const alarmSounds = new AlarmSounds();
