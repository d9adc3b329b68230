/** Why nobody listens. `not-on-device`: the browser would send what it hears to somebody else, so it is not asked. */
export type VoiceTrouble = 'unsupported' | 'not-on-device' | 'not-allowed' | 'stopped';
export type VoiceEar = 'starting' | 'listening' | VoiceTrouble;

const LANGUAGE = 'en-US';
const BETWEEN_MS = 400;
/** It ends by itself after silence, which is no trouble; ending at once again and again is. */
const MOST_QUICK_ENDS = 5;
const QUICK_MS = 1_000;

interface Heard {
  resultIndex: number;
  results: ArrayLike<ArrayLike<{ transcript: string }> & { isFinal: boolean }>;
}

/** The part of the browser's recogniser that is used here; its on-device half is newer than the types. */
interface Recogniser {
  lang: string;
  continuous: boolean;
  interimResults: boolean;
  processLocally: boolean;
  onstart: (() => void) | null;
  onresult: ((event: Heard) => void) | null;
  onerror: ((event: { error: string }) => void) | null;
  onend: (() => void) | null;
  start: () => void;
  abort: () => void;
}

interface RecogniserClass {
  new (): Recogniser;
  available?: (options: { langs: string[]; processLocally: boolean }) => Promise<string>;
}

function recogniserOf(scope: object): RecogniserClass | null {
  const { SpeechRecognition, webkitSpeechRecognition } = scope as {
    SpeechRecognition?: RecogniserClass;
    webkitSpeechRecognition?: RecogniserClass;
  };
  return SpeechRecognition ?? webkitSpeechRecognition ?? null;
}

/** Whether this browser can turn speech into words without sending it anywhere. */
async function obstacle(kind: RecogniserClass | null): Promise<VoiceTrouble | null> {
  if (!kind) return 'unsupported';
  const found = await kind.available?.({ langs: [LANGUAGE], processLocally: true }).catch(() => 'unavailable');
  return found === 'available' ? null : 'not-on-device';
}

/** Listens on this device until the returned function is called, and refuses where that cannot be had. */
export async function listenOnDevice(
  onWords: (words: string) => void,
  onEar: (ear: VoiceEar) => void,
): Promise<() => void> {
  onEar('starting');
  const kind = recogniserOf(globalThis);
  const trouble = await obstacle(kind);
  if (!kind || trouble) {
    onEar(trouble ?? 'unsupported');
    return () => undefined;
  }
  let isWanted = true;
  let startedAtMs = 0;
  let quickEndCount = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;
  const recogniser = new kind();
  recogniser.lang = LANGUAGE;
  recogniser.continuous = true;
  recogniser.interimResults = false;
  recogniser.processLocally = true;
  const giveUp = (why: VoiceTrouble) => {
    isWanted = false;
    onEar(why);
  };
  const begin = () => {
    startedAtMs = performance.now();
    try {
      recogniser.start();
    } catch {
      giveUp('stopped');
    }
  };
  recogniser.onstart = () => onEar('listening');
  recogniser.onresult = ({ resultIndex, results }) => {
    for (let index = resultIndex; index < results.length; index += 1) {
      const result = results[index];
      const words = result?.[0]?.transcript;
      if (isWanted && result?.isFinal && words) onWords(words);
    }
  };
  recogniser.onerror = ({ error }) => {
    if (!isWanted) return;
    if (error === 'not-allowed' || error === 'service-not-allowed') giveUp('not-allowed');
    if (error === 'language-not-supported') giveUp('not-on-device');
    if (error === 'audio-capture') giveUp('stopped');
  };
  recogniser.onend = () => {
    if (!isWanted) return;
    quickEndCount = performance.now() - startedAtMs < QUICK_MS ? quickEndCount + 1 : 0;
    if (quickEndCount >= MOST_QUICK_ENDS) giveUp('stopped');
    else timer = setTimeout(begin, BETWEEN_MS);
  };
  begin();
  return () => {
    isWanted = false;
    clearTimeout(timer);
    recogniser.abort();
  };
}
