import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Readable, Writable } from 'node:stream';
import type { DemoRole } from './browser.ts';

type Params = Record<string, unknown>;
interface Message {
  id?: number;
  result?: unknown;
  error?: { message: string };
}

/** How long a deliberate press lasts, and how far apart two presses on one spot are. */
const PRESS_MS = 110;
const BETWEEN_MS = 450;

/**
 * Chromium on the bare protocol. A page of it is hidden, held back and frozen like a page of a person, and a look into it is no gesture of
 * theirs: a test library that waits for elements would let sound out, and would keep every page in sight.
 */
export class Chromium {
  private nextId = 1;
  private readonly waiting = new Map<number, { resolve: (result: unknown) => void; reject: (error: Error) => void }>();

  private constructor(
    private readonly process: ChildProcess,
    private readonly profile: string,
  ) {
    let rest = '';
    (process.stdio[4] as Readable).setEncoding('utf8').on('data', (chunk: string) => {
      const messages = (rest + chunk).split('\0');
      rest = messages.pop() ?? '';
      for (const message of messages) this.take(JSON.parse(message) as Message);
    });
  }

  static async launch(...flags: string[]): Promise<Chromium> {
    const profile = await mkdtemp(join(tmpdir(), 'steepfall-e2e-'));
    const args = ['--headless=new', '--no-sandbox', '--disable-gpu', '--no-first-run', '--window-size=1280,800'];
    const quiet = ['--disable-background-networking', '--disable-component-update', '--disable-sync', '--disable-quic'];
    const process = spawn(
      '/usr/bin/chromium',
      [...args, ...quiet, ...flags, `--user-data-dir=${profile}`, '--remote-debugging-pipe', 'about:blank'],
      { stdio: ['ignore', 'ignore', 'ignore', 'pipe', 'pipe'] },
    );
    return new Chromium(process, profile);
  }

  send<Result>(method: string, params: Params = {}, sessionId?: string): Promise<Result> {
    const id = this.nextId;
    this.nextId += 1;
    return new Promise<Result>((resolve, reject) => {
      this.waiting.set(id, { resolve: resolve as (result: unknown) => void, reject });
      const message = JSON.stringify({ id, method, params, ...(sessionId ? { sessionId } : {}) });
      (this.process.stdio[3] as Writable).write(`${message}\0`);
    });
  }

  /** A page that runs `script` before anything of its own. */
  async newTab(script = ''): Promise<Tab> {
    const { targetId } = await this.send<{ targetId: string }>('Target.createTarget', { url: 'about:blank' });
    const { sessionId } = await this.send<{ sessionId: string }>('Target.attachToTarget', { targetId, flatten: true });
    const tab = new Tab(this, targetId, sessionId);
    await tab.send('Page.enable');
    if (script) await tab.send('Page.addScriptToEvaluateOnNewDocument', { source: script });
    return tab;
  }

  async close(): Promise<void> {
    const ended = once(this.process, 'exit');
    await Promise.race([this.send('Browser.close').catch(() => undefined), ended]);
    await ended;
    await rm(this.profile, { recursive: true, force: true, maxRetries: 5 });
  }

  private take({ id, result, error }: Message): void {
    const waiting = this.waiting.get(id ?? -1);
    if (!waiting) return;
    this.waiting.delete(id ?? -1);
    if (error) waiting.reject(new Error(error.message));
    else waiting.resolve(result);
  }
}

export class Tab {
  constructor(
    private readonly browser: Chromium,
    private readonly targetId: string,
    private readonly sessionId: string,
  ) {}

  send<Result>(method: string, params: Params = {}): Promise<Result> {
    return this.browser.send<Result>(method, params, this.sessionId);
  }

  async goto(url: string): Promise<void> {
    await this.send('Page.navigate', { url });
  }

  /** A look into the page, which is no gesture. */
  async look<Value>(expression: string): Promise<Value> {
    const { result, exceptionDetails } = await this.send<{ result: { value: Value }; exceptionDetails?: unknown }>(
      'Runtime.evaluate',
      { expression, returnByValue: true, awaitPromise: true, userGesture: false },
    );
    if (exceptionDetails) throw new Error(`${expression}: ${JSON.stringify(exceptionDetails)}`);
    return result.value;
  }

  async until<Value>(expression: string, timeoutMs = 30_000): Promise<Value> {
    const untilMs = Date.now() + timeoutMs;
    for (;;) {
      const value = await this.look<Value>(expression).catch(() => null);
      if (value) return value;
      if (Date.now() > untilMs) {
        const seen = await this.look<string>('document.body?.innerText ?? ""').catch(() => 'nothing');
        throw new Error(`Not within ${timeoutMs} ms: ${expression}\nOn the screen: ${seen}`);
      }
      await new Promise((passed) => setTimeout(passed, 40));
    }
  }

  heading(title: string, timeoutMs?: number): Promise<unknown> {
    return this.until(
      `document.querySelector('#step-heading')?.textContent.trim() === ${JSON.stringify(title)}`,
      timeoutMs,
    );
  }

  /** A finger on the button that says this, as long as a deliberate press lasts. */
  async tap(name: string, holdMs = PRESS_MS): Promise<void> {
    await new Promise((passed) => setTimeout(passed, BETWEEN_MS));
    const place = await this.until<{ x: number; y: number }>(`(() => {
      const words = (one) => one.getAttribute('aria-label') ?? one.innerText;
      const buttons = [...document.querySelectorAll('button, [role="radio"]')].filter((one) => one.getClientRects().length > 0);
      const button = buttons.find((one) => words(one).trim().startsWith(${JSON.stringify(name)}));
      if (!button) return null;
      const { left, top, width, height } = button.getBoundingClientRect();
      return { x: left + width / 2, y: top + height / 2 };
    })()`);
    await this.touch(place, holdMs);
  }

  async touch(place: { x: number; y: number }, holdMs = PRESS_MS): Promise<void> {
    await this.send('Input.dispatchTouchEvent', { type: 'touchStart', touchPoints: [place] });
    await new Promise((passed) => setTimeout(passed, holdMs));
    await this.send('Input.dispatchTouchEvent', { type: 'touchEnd', touchPoints: [] });
  }

  /** A press of a pedal or of the keyboard. */
  async key(key: string): Promise<void> {
    const text = key === ' ' ? { text: ' ' } : {};
    await this.send('Input.dispatchKeyEvent', { type: 'keyDown', key, code: key === ' ' ? 'Space' : key, ...text });
    await this.send('Input.dispatchKeyEvent', { type: 'keyUp', key, code: key === ' ' ? 'Space' : key });
  }

  async type(selector: string, text: string): Promise<void> {
    await this.until(
      `(document.querySelector(${JSON.stringify(selector)})?.focus(), document.activeElement?.matches(${JSON.stringify(selector)}))`,
    );
    await this.send('Input.insertText', { text });
  }

  /** In front of the others, which are hidden by it. */
  async bringToFront(): Promise<void> {
    await this.browser.send('Target.activateTarget', { targetId: this.targetId });
  }

  async freeze(): Promise<void> {
    await this.send('Page.setWebLifecycleState', { state: 'frozen' });
  }

  async wake(): Promise<void> {
    await this.send('Page.setWebLifecycleState', { state: 'active' });
  }

  async screenshot(path: string): Promise<void> {
    const { data } = await this.send<{ data: string }>('Page.captureScreenshot', { format: 'png' });
    await writeFile(path, Buffer.from(data, 'base64'));
  }

  async close(): Promise<void> {
    await this.browser.send('Target.closeTarget', { targetId: this.targetId });
  }
}

/** Signs in on a tab of its own, so that the next one opens untouched. */
export async function signIn(browser: Chromium, url: string, role: DemoRole): Promise<Tab> {
  const tab = await browser.newTab();
  await tab.goto(url);
  await tab.type('input[type="email"]', `${role}@wrenfold.example`);
  await tab.type('input[type="password"]', `wrenfold-${role}`);
  await tab.tap('Sign in');
  await tab.until(`!document.querySelector('input[type="password"]')`);
  return tab;
}
