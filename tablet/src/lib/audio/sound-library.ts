/** Tones and spoken clips, decoded once. They are precached with the app, so that this works without the hub. */
export class SoundLibrary {
  private readonly coming = new Map<string, Promise<void>>();
  private readonly ready = new Map<string, AudioBuffer>();

  /** Fetches what is not here yet; a file that does not come is asked for again at the next call. */
  async load(context: BaseAudioContext, paths: readonly string[]): Promise<void> {
    await Promise.all(paths.filter((path) => !this.ready.has(path)).map((path) => this.fetchOnce(context, path)));
  }

  /** All of them, or null while one is missing: a sentence with a hole misleads. */
  take(paths: readonly string[]): AudioBuffer[] | null {
    const found = paths.map((path) => this.ready.get(path));
    return found.every((buffer) => buffer !== undefined) ? found : null;
  }

  private fetchOnce(context: BaseAudioContext, path: string): Promise<void> {
    const coming = this.coming.get(path) ?? this.fetchNow(context, path).finally(() => this.coming.delete(path));
    this.coming.set(path, coming);
    return coming;
  }

  private async fetchNow(context: BaseAudioContext, path: string): Promise<void> {
    try {
      const response = await fetch(path);
      if (!response.ok) return;
      this.ready.set(path, await context.decodeAudioData(await response.arrayBuffer()));
    } catch {
      // Offline before the app was kept, or a file that cannot be decoded: the tone goes without words.
    }
  }
}
