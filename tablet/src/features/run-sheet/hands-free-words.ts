import type { VoiceEar } from '#lib/voice/recogniser.ts';
import type { WaveSight } from '#lib/wave/wave-camera.ts';

/** One word for a camera or a microphone, for the status line. */
export const handsFreeWord: Record<WaveSight | VoiceEar | 'off', string> = {
  off: 'off',
  starting: 'starting',
  looking: 'looking',
  listening: 'listening',
  'no-camera': 'no camera',
  'not-allowed': 'not allowed',
  'https-needed': 'HTTPS needed',
  unsupported: 'unsupported',
  'not-on-device': 'not on this device',
  stopped: 'stopped',
};

export function isHandsFreeBad(of: WaveSight | VoiceEar | 'off'): boolean {
  return of !== 'off' && of !== 'starting' && of !== 'looking' && of !== 'listening';
}

export const waveText: Record<WaveSight | 'off', string> = {
  off: 'The camera is off.',
  starting: 'The camera starts. The browser may ask whether it is allowed.',
  looking:
    'The camera looks for a hand that goes across and back. No picture is kept or sent. It is off when the page is hidden and when the run ends.',
  'no-camera': 'No camera answers on this device, or another program has it. A page-turner pedal does the same.',
  'not-allowed':
    'The camera is not allowed for this page. Allow it in the settings of the browser, then switch the wave off and on under “This station”.',
  'https-needed': 'A page gets the camera over HTTPS only. A page-turner pedal works without.',
};

export const voiceText: Record<VoiceEar | 'off', string> = {
  off: 'Nobody listens.',
  starting: 'The microphone starts. The browser may ask whether it is allowed.',
  listening:
    'Say “done”, “back one”, “heard it”, “how hot”, “how long” or “note: …”. What is said is understood on this device, and not sent.',
  unsupported: 'This browser understands no speech. A page-turner pedal or a wave does the same.',
  'not-on-device':
    'This browser understands no English speech on the device itself, and would send it away. So nobody listens. A page-turner pedal or a wave does the same.',
  'not-allowed': 'The microphone is not allowed for this page. Allow it in the settings of the browser.',
  stopped:
    'The microphone went away, or the browser stopped listening. Switch the voice off and on under “This station”.',
};
