import { seeFrame, stillWave } from './wave-detector.ts';

const WIDTH = 32;
const HEIGHT = 24;
const FRAME_MS = 80;

export type WaveTrouble = 'no-camera' | 'not-allowed' | 'https-needed';
export type WaveSight = 'starting' | 'looking' | WaveTrouble;

async function openCamera(): Promise<MediaStream | WaveTrouble> {
  const devices = (navigator as Partial<Navigator>).mediaDevices;
  if (!devices) return window.isSecureContext ? 'no-camera' : 'https-needed';
  try {
    return await devices.getUserMedia({
      audio: false,
      video: { facingMode: 'user', width: { ideal: 320 }, height: { ideal: 240 }, frameRate: { ideal: 15 } },
    });
  } catch (error) {
    return error instanceof DOMException && error.name === 'NotAllowedError' ? 'not-allowed' : 'no-camera';
  }
}

/**
 * Looks through the camera for a wave until the returned function is called. Each picture is shrunk to a few hundred brightnesses and
 * forgotten with the next one: nothing is kept and nothing is sent.
 */
export async function watchForWaves(onWave: () => void, onSight: (sight: WaveSight) => void): Promise<() => void> {
  onSight('starting');
  const stream = await openCamera();
  if (typeof stream === 'string') {
    onSight(stream);
    return () => undefined;
  }
  const video = document.createElement('video');
  video.muted = true;
  video.playsInline = true;
  video.srcObject = stream;
  const canvas = document.createElement('canvas');
  canvas.width = WIDTH;
  canvas.height = HEIGHT;
  const pen = canvas.getContext('2d', { willReadFrequently: true });
  const [track] = stream.getVideoTracks();
  // The plug was pulled, or another program took the camera.
  track?.addEventListener('ended', () => onSight('no-camera'));
  await video.play().then(
    () => onSight('looking'),
    () => onSight('no-camera'),
  );

  let state = stillWave;
  const look = () => {
    if (!pen || video.readyState < HTMLMediaElement.HAVE_CURRENT_DATA) return;
    pen.drawImage(video, 0, 0, WIDTH, HEIGHT);
    const { data } = pen.getImageData(0, 0, WIDTH, HEIGHT);
    const light = new Uint8ClampedArray(WIDTH * HEIGHT);
    for (let index = 0; index < light.length; index += 1) light[index] = data[index * 4 + 1] ?? 0;
    const step = seeFrame(state, { atMs: performance.now(), width: WIDTH, height: HEIGHT, light });
    state = step.state;
    if (step.isWave) onWave();
  };
  const timer = setInterval(look, FRAME_MS);
  return () => {
    clearInterval(timer);
    for (const one of stream.getTracks()) one.stop();
    video.srcObject = null;
  };
}
