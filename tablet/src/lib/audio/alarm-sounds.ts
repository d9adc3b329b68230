import { Howl, Howler } from 'howler';
import { subscribeTick } from '../clock/ticker.ts';
import { isShallowSame, ValueStore } from '../value-store.ts';
import { nextRepair, soundHealth, type AudioSigns, type ContextState, type SoundHealth } from './audio-health.ts';
import { composeRing, isLooped, type AlarmLevel } from './compose-ring.ts';
import { passSilentSwitch } from './silent-switch.ts';
import { SoundLibrary } from './sound-library.ts';

export type { AlarmLevel } from './compose-ring.ts';

export interface Ring {
  level: AlarmLevel;
  /** Names what rings, so that the same alarm is not started twice. */
  id: string;
  /** Spoken clips after the tone, by name: "hops-in", "n62", "degrees". */
  say?: readonly string[];
}

/** A ring that is known to come: `inS` seconds from now, less than nothing when it should sound already. */
export interface PlannedRing {
  ring: Ring;
  inS: number;
}

export interface SoundState {
  /** `untested`: nobody has tapped since the page was loaded, so the browser keeps it silent. */
  health: SoundHealth | 'untested';
  /** What sounds at this moment. */
  ringing: string | null;
  /** Sound was taken away and came back, as after a call. Nobody has listened since whether it is still loud, and in this room. */
  wasInterrupted: boolean;
}

/** A ring on the audio clock. */
interface Voice {
  ring: Ring;
  source: AudioBufferSourceNode;
  /** On the audio clock, s. */
  startsAtS: number;
  hasWords: boolean;
}

const LEVELS: readonly AlarmLevel[] = ['coming-up', 'stand-by', 'now', 'urgent'];
const CLOCK_LOOK_MS = 240;
const ASK_AGAIN_MS = 5_000;
/** A glitch is over before anybody could miss an alarm; what lasts longer may have gone to another speaker. */
const INTERRUPTED_MS = 2_000;
/** A plan that starts so soon is the ring itself: the clocks of page and output agree no better, and nobody misses it. */
const ADOPT_AHEAD_S = 0.25;
/** A plan that moves by less stays as it is. */
const PLAN_SLACK_S = 0.25;
/** Further ahead a plan only waits: it will have changed by then. */
const PLAN_AHEAD_S = 60;
/** Loud enough to keep an output alive, far below what anybody hears. */
const WARMTH = 1e-4;
const BUZZ: Record<AlarmLevel, { pattern: number[]; everyMs: number }> = {
  'coming-up': { pattern: [120], everyMs: Infinity },
  'stand-by': { pattern: [160, 120, 160], everyMs: 10_000 },
  now: { pattern: [300, 120, 300, 120, 600], everyMs: 8_000 },
  urgent: { pattern: [600, 120, 600, 120, 600], everyMs: 4_000 },
};
const CHECK_WORDS = ['sound-check'];

const tonePath = (level: AlarmLevel) => `/sounds/${level}.wav`;
const clipPath = (clip: string) => `/speech/${clip}.mp3`;
const tonePaths = LEVELS.map(tonePath);
const isSameRing = (a: Ring | null, b: Ring | null) =>
  a?.id === b?.id && a?.level === b?.level && (a?.say ?? []).join() === (b?.say ?? []).join();

/** Alarms on Web Audio: one at a time, never queued on a locked context. Howler carries the bare tone where nothing could be decoded. */
class AlarmSounds {
  readonly state = new ValueStore<SoundState>(
    { health: 'untested', ringing: null, wasInterrupted: false },
    isShallowSame,
  );
  private howls: Record<AlarmLevel, Howl> | null = null;
  private wanted: Ring | null = null;
  private playing: Ring | null = null;
  private voice: Voice | null = null;
  private wantedPlan: PlannedRing | null = null;
  private planned: Voice | null = null;
  /** What is said once and has been said: silence after it is no reason to say it again. */
  private saidOnce: string | null = null;
  private test: { stop: () => void } | null = null;
  private buzzedAtMs = 0;
  private look: { contextS: number; atMs: number } | null = null;
  private isClockMoving = false;
  private blockedSinceMs: number | null = null;
  private triedCount = 0;
  private isRepairing = false;
  private hasLoadFailed = false;
  private warm: AudioBufferSourceNode | null = null;
  private isWarmWanted = false;
  private readonly library = new SoundLibrary();
  private words: readonly string[] = [];
  private askedAtMs = 0;
  private composed: { key: string; buffer: AudioBuffer } | null = null;

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
    // A finger counts as a gesture when it lifts, a mouse when it presses; a repair begun too early would be in the way of the right one.
    const inTap = { capture: true, passive: true };
    addEventListener('pointerdown', ({ pointerType }) => void this.recover(pointerType === 'mouse'), inTap);
    addEventListener('pointerup', () => void this.recover(true), inTap);
    addEventListener('keydown', () => void this.recover(true), inTap);
  }

  /** To be called inside a tap: browsers let sound out only then. */
  async unlock(): Promise<boolean> {
    this.start();
    passSilentSwitch();
    const { context } = this;
    if (!context) return false;
    const silence = context.createBufferSource();
    silence.buffer = context.createBuffer(1, 1, context.sampleRate);
    silence.connect(context.destination);
    silence.start();
    if (this.hasLoadFailed) this.reload();
    const decoded = this.library.load(context, [...tonePaths, ...CHECK_WORDS.map(clipPath)]);
    const ready = Promise.all([context.resume(), this.loaded(), decoded]);
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

  /**
   * A ring that is known to come, put on the audio clock as well: it sounds on time in a page whose timers are held back. `ring` with the
   * same id takes it over as it is; a plan that changes or goes is cancelled.
   */
  plan(plan: PlannedRing | null): void {
    this.wantedPlan = plan;
    this.applyPlan();
  }

  /** Makes the words of a run ready before they are needed; what is missing at its moment is left to the tone. */
  prepareSpeech(clips: readonly string[]): void {
    this.words = clips.map(clipPath);
    this.askForFiles();
  }

  /** Plays an alarm for the ear alone, as for the sound check: "This is how I call you." Nothing that rings for the run is touched by it. */
  playTest(level: AlarmLevel): void {
    this.stopTest();
    if (this.state.get().health !== 'fine') return;
    const buffer = this.turnOf({ level, id: 'test', say: CHECK_WORDS });
    if (buffer) {
      const source = this.startSource(buffer, isLooped(level), 0);
      this.test = { stop: () => source.stop() };
    } else {
      const soundId = this.howls?.[level].play();
      this.test = { stop: () => this.howls?.[level].stop(soundId) };
    }
    this.state.set({ ...this.state.get(), wasInterrupted: false });
  }

  /** Says something once, as an answer to a question. An alarm is never talked over. */
  async say(clips: readonly string[]): Promise<void> {
    const { context } = this;
    const paths = clips.map(clipPath);
    if (!context || paths.length === 0) return;
    await this.library.load(context, paths);
    if (this.state.get().health !== 'fine' || this.playing) return;
    let atS = 0;
    for (const word of this.library.take(paths) ?? []) {
      this.startSource(word, false, atS);
      atS += word.duration;
    }
  }

  stopTest(): void {
    this.test?.stop();
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
      const howl = new Howl({ src: [tonePath(level)], loop: isLooped(level), html5: false });
      howl.once('load', onLoad);
      howl.once('loaderror', onFail);
      return howl;
    };
    this.howls = {
      'coming-up': load('coming-up'),
      'stand-by': load('stand-by'),
      now: load('now'),
      urgent: load('urgent'),
    };
    const { context } = this;
    if (context) context.onstatechange = () => void this.recover(false);
  }

  private get isLoaded(): boolean {
    const { howls } = this;
    return howls !== null && !this.hasLoadFailed && LEVELS.every((level) => howls[level].state() === 'loaded');
  }

  /** The files once more, after one of them did not come. */
  private reload(): void {
    this.dropVoices();
    this.stopTest();
    for (const level of LEVELS) this.howls?.[level].unload();
    this.howls = null;
    this.load();
  }

  private async loaded(): Promise<void> {
    while (!this.isLoaded && !this.hasLoadFailed) await new Promise((resolve) => setTimeout(resolve, 25));
  }

  /** Tones and words, decoded. What did not come is asked for again. */
  private askForFiles(): void {
    const { context } = this;
    const paths = [...tonePaths, ...this.words, ...(this.playing?.say ?? []).map(clipPath)];
    if (!context || context.state !== 'running' || this.library.take(paths)) return;
    this.askedAtMs = performance.now();
    void this.library.load(context, paths).then(() => {
      const { voice, playing } = this;
      if (playing && !voice?.hasWords && this.wordsOf(playing).length > 0) this.begin(playing);
      this.applyPlan();
    });
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
    if (nowMs - this.askedAtMs >= ASK_AGAIN_MS) this.askForFiles();
    if (this.playing && nowMs - this.buzzedAtMs >= BUZZ[this.playing.level].everyMs) this.buzz(this.playing.level);
  }

  private judge(): void {
    const before = this.state.get();
    const outputHealth = soundHealth(this.signs());
    if (outputHealth === 'fine') this.triedCount = 0;
    const known = outputHealth === 'fine' && !this.isLoaded ? 'blocked' : outputHealth;
    const hasBeenFine = before.health !== 'untested' || this.hasLoadFailed;
    const health = known === 'blocked' && !hasBeenFine ? 'untested' : known;
    this.state.set({ ...before, health, wasInterrupted: before.wasInterrupted || this.isInterrupted(health) });
    if (health === 'fine') this.applyWarmth();
    else this.dropVoices();
    this.apply();
    this.applyPlan();
  }

  /** True from the moment at which sound has been away for longer than a glitch. */
  private isInterrupted(health: SoundState['health']): boolean {
    const nowMs = performance.now();
    if (health === 'blocked') this.blockedSinceMs ??= nowMs;
    else this.blockedSinceMs = null;
    return this.blockedSinceMs !== null && nowMs - this.blockedSinceMs >= INTERRUPTED_MS;
  }

  private apply(): void {
    const { wanted, playing } = this;
    if (isSameRing(wanted, playing)) return;
    const isSaid = wanted !== null && this.saidOnce === wanted.id && playing?.id !== wanted.id;
    if (wanted && !isSaid && this.state.get().health === 'fine') this.begin(wanted);
    else if (playing) this.halt();
  }

  /** Whatever sounded before stops without a word: listeners hear of the new one only. */
  private begin(ring: Ring): void {
    const adopted = this.adopt(ring);
    this.stopSounding();
    this.playing = ring;
    this.voice = adopted ?? this.speak(ring, 0);
    if (!this.voice) this.howls?.[ring.level].play();
    if (!isLooped(ring.level)) this.saidOnce = ring.id;
    if (!this.voice?.hasWords) this.askForFiles();
    this.buzz(ring.level);
    this.state.set({ ...this.state.get(), ringing: ring.id });
  }

  /** The planned ring for this alarm, when it sounds already or is about to: to start anew would be heard as a stumble. */
  private adopt(ring: Ring): Voice | null {
    const { planned, context } = this;
    if (!planned || !context || planned.ring.id !== ring.id) return null;
    const isDue = planned.startsAtS - context.currentTime <= ADOPT_AHEAD_S && planned.ring.level === ring.level;
    if (isDue) this.planned = null;
    else this.dropPlan();
    return isDue ? planned : null;
  }

  private applyPlan(): void {
    const { wantedPlan, planned, context } = this;
    if (!context || this.state.get().health !== 'fine') return;
    const isSame = isSameRing(wantedPlan?.ring ?? null, planned?.ring ?? null);
    if (planned && isSame && wantedPlan) {
      const hasBegun = planned.startsAtS <= context.currentTime;
      const movedS = Math.abs(planned.startsAtS - context.currentTime - wantedPlan.inS);
      if (hasBegun || movedS < PLAN_SLACK_S) return;
    }
    this.dropPlan();
    // What rings already is planned no more.
    if (!wantedPlan || wantedPlan.ring.id === this.playing?.id || wantedPlan.inS <= 0 || wantedPlan.inS > PLAN_AHEAD_S)
      return;
    this.planned = this.speak(wantedPlan.ring, wantedPlan.inS);
  }

  private wordsOf({ say = [] }: Ring): AudioBuffer[] {
    return this.library.take(say.map(clipPath)) ?? [];
  }

  /** One turn of this ring; null while its tone has not been decoded. */
  private turnOf(ring: Ring): AudioBuffer | null {
    const { context } = this;
    const [tone] = this.library.take([tonePath(ring.level)]) ?? [];
    if (!context || !tone) return null;
    const words = this.wordsOf(ring);
    const key = [context.sampleRate, ring.level, words.length, ...(ring.say ?? [])].join();
    if (this.composed?.key !== key) this.composed = { key, buffer: composeRing(context, ring.level, tone, words) };
    return this.composed.buffer;
  }

  /** Tone and words in one piece, on the audio clock. */
  private speak(ring: Ring, inS: number): Voice | null {
    const { context } = this;
    const buffer = this.turnOf(ring);
    if (!context || !buffer) return null;
    const source = this.startSource(buffer, isLooped(ring.level), inS);
    const voice = { ring, source, startsAtS: context.currentTime + inS, hasWords: this.wordsOf(ring).length > 0 };
    source.onended = () => {
      if (this.voice === voice) this.state.set({ ...this.state.get(), ringing: null });
    };
    return voice;
  }

  private startSource(buffer: AudioBuffer, loop: boolean, inS: number): AudioBufferSourceNode {
    const context = this.context as AudioContext;
    const source = context.createBufferSource();
    source.buffer = buffer;
    source.loop = loop;
    source.connect(context.destination);
    source.start(context.currentTime + inS);
    return source;
  }

  private buzz(level: AlarmLevel): void {
    this.buzzedAtMs = performance.now();
    (navigator as Partial<Navigator>).vibrate?.(BUZZ[level].pattern);
  }

  private stopSounding(): void {
    this.stopTest();
    this.voice?.source.stop();
    this.voice = null;
    for (const level of LEVELS) this.howls?.[level].stop();
  }

  private dropPlan(): void {
    this.planned?.source.stop();
    this.planned = null;
  }

  private dropVoices(): void {
    this.dropPlan();
    if (this.playing) this.halt();
  }

  private halt(): void {
    this.stopSounding();
    this.playing = null;
    (navigator as Partial<Navigator>).vibrate?.(0);
    this.state.set({ ...this.state.get(), ringing: null });
  }

  private async recover(isInTap: boolean): Promise<void> {
    const { context } = this;
    if (!context || (this.isRepairing && !isInTap)) return;
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

  /** A new context: what sounded on the old one is gone with it. */
  private rebuild(): void {
    this.warm = null;
    this.voice = null;
    this.planned = null;
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
    this.warm = this.startSource(buffer, true, 0);
  }
}

/** A locked context never answers: no waiting for it. */
function briefly(work: Promise<void> | undefined): Promise<unknown> {
  return Promise.race([work, new Promise((resolve) => setTimeout(resolve, 500))]);
}

export const alarmSounds = new AlarmSounds();
