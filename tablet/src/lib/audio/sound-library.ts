/** Tones and spoken clips, decoded once. They are precached with the app, so that this works without the hub. */
export class SoundLibrary {
  private readonly buffers = new Map<string, Promise<AudioBuffer | null>>();
  private readonly ready = new Map<string, AudioBuffer>();

  /** Fetches what is not here yet; a file that does not come is asked for again at the next call. */
  async load(context: BaseAudioContext, paths: readonly string[]): Promise<void> {
    await Promise.all(paths.map((path) => this.fetchOnce(context, path)));
  }

  /** All of them, or null while one is missing: a sentence with a hole misleads. */
  take(paths: readonly string[]): AudioBuffer[] | null {
    const found = paths.map((path) => this.ready.get(path));
    return found.every((buffer) => buffer !== undefined) ? found : null;
  }

  private fetchOnce(context: BaseAudioContext, path: string): Promise<AudioBuffer | null> {
    const known = this.buffers.get(path);
    if (known) return known;
    const coming = this.fetchNow(context, path);
    this.buffers.set(path, coming);
    return coming;
  }

  private async fetchNow(context: BaseAudioContext, path: string): Promise<AudioBuffer | null> {
    try {
      const response = await fetch(path);
      if (!response.ok) throw new Error(`${path}: ${response.status}`);
      const buffer = await context.decodeAudioData(await response.arrayBuffer());
      this.ready.set(path, buffer);
      return buffer;
    } catch {
      this.buffers.delete(path);
      return null;
    }
  }
}
