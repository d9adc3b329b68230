import type { Page } from 'playwright-core';

/** How long a deliberate press lasts. */
const PRESS_MS = 110;
/** Between two presses on one spot; the sheet takes a faster second one for water. */
const BETWEEN_MS = 450;

/** A person at the run sheet: reads the heading, presses what is there. Knows nothing that is not on the screen. */
export class Hand {
  constructor(readonly page: Page) {}

  async title(): Promise<string> {
    return (await this.page.locator('#step-heading').textContent())?.trim() ?? '';
  }

  async press(name: string | RegExp): Promise<void> {
    await this.page.waitForTimeout(BETWEEN_MS);
    await this.page.getByRole('button', { name }).click({ delay: PRESS_MS });
  }

  /** Waits until the sheet asks for this step, alert or not. */
  async until(title: string, timeout = 60_000): Promise<void> {
    await this.page.locator('#step-heading', { hasText: new RegExp(`^${title}$`) }).waitFor({ timeout });
  }

  async checkSound(): Promise<void> {
    await this.until('Sound check');
    await this.press('Play the alarm');
    await this.press('Yes, I heard it');
  }

  /** Done with the step that is on the sheet now. */
  async done(title: string): Promise<void> {
    await this.until(title);
    await this.press(/^Done/);
  }

  /**
   * Done with an addition when its alert has said "now", and what it waits for has come: the call comes early by the time a hand needs, and
   * this one is quicker.
   */
  async doneWhenCalled(title: string, hasCome: () => Promise<boolean> = () => Promise.resolve(true)): Promise<void> {
    const alert = this.page.getByRole('region', { name: 'Alert' });
    await alert.getByRole('heading', { name: title }).waitFor({ timeout: 90_000 });
    while (!(await hasCome())) await this.page.waitForTimeout(50);
    await this.page
      .getByRole('button', { name: new RegExp(`^Done\\s*${title}`) })
      .click({ delay: PRESS_MS, timeout: 30_000 });
  }

  async measure(title: string, button: RegExp, value: string): Promise<void> {
    await this.until(title);
    await this.press(button);
    const dialog = this.page.getByRole('dialog');
    await dialog.getByRole('textbox').fill(value);
    await dialog.getByRole('button', { name: 'Keep it' }).click();
    await dialog.waitFor({ state: 'hidden' });
  }

  async note(text: string): Promise<void> {
    await this.press('Note');
    const dialog = this.page.getByRole('dialog');
    await dialog.getByRole('textbox').fill(text);
    await dialog.getByRole('button', { name: 'Keep the note' }).click();
    await dialog.waitFor({ state: 'hidden' });
  }

  async setRate(rate: 1 | 10 | 30 | 60): Promise<void> {
    await this.page.getByRole('radio', { name: `×${rate}`, exact: true }).click();
  }

  /** Seconds on the running timer, as shown. */
  async secondsLeft(): Promise<number> {
    const shown = (await this.page.locator('.countdown-figure').textContent()) ?? '';
    return shown.split(':').reduce((total, part) => total * 60 + Number(part), 0);
  }
}
