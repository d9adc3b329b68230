import { seeFrame, stillWave } from './wave-detector.ts';

const WIDTH = 32;
const HEIGHT = 24;
const FRAME_MS = 80;

export type WaveTrouble = 'no-camera' | 'not-allowed';

/**
 * Looks through the camera for a wave until the returned function is called. Each picture is shrunk to a few hundred brightnesses and
 * forgotten with the next one: nothing is kept and nothing is sent.
 */
export async function watchForWaves(
  onWave: () => void,
  onTrouble: (trouble: WaveTrouble) => void,
): Promise<() => void> {
  let stream: MediaStream;
  try {
    stream = await navigator.mediaDevices.getUserMedia({
      audio: false,
      video: { facingMode: 'user', width: { ideal: 320 }, height: { ideal: 240 }, frameRate: { ideal: 15 } },
    });
  } catch (error) {
    onTrouble(error instanceof DOMException && error.name === 'NotAllowedError' ? 'not-allowed' : 'no-camera');
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
  await video.play().catch(() => onTrouble('no-camera'));

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
    for (const track of stream.getTracks()) track.stop();
    video.srcObject = null;
  };
}
