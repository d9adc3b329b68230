/* global document, MutationObserver, requestAnimationFrame -- what runs inside the page */
import { chromium } from 'playwright-core';

/**
 * @typedef {object} Screen a tablet in real Chromium, on the run sheet of one run
 * @property {() => Promise<number[]>} paintedAtMs wall time of each frame that showed a newer reading: the age of the newest one, as the sheet tells it, went down
 * @property {() => Promise<void>} close
 */

/**
 * @param {{ url: string, runId: string, email: string, password: string }} where
 * @returns {Promise<Screen>}
 */
export async function openScreen({ url, runId, email, password }) {
  const browser = await chromium.launch({
    executablePath: '/usr/bin/chromium',
    args: ['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update'],
  });
  const page = await browser.newPage({ viewport: { width: 1280, height: 800 } });
  await page.goto(url);
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByLabel('E-mail').waitFor({ state: 'detached' });
  await page.goto(`${url}/runs/${runId}`);
  await page.locator('.live-figure').waitFor();
  await page.evaluate(() => {
    /** @type {number[]} */
    const painted = [];
    Object.assign(globalThis, { painted });
    let shownAgeS = Infinity;
    const look = () => {
      const ageS = Number.parseFloat(document.querySelector('.chip[data-name="probe"] .chip-word')?.textContent ?? '');
      const isNewer = ageS < shownAgeS;
      shownAgeS = ageS;
      // The second frame begins when the first one is on the glass.
      if (isNewer)
        requestAnimationFrame(() =>
          requestAnimationFrame(() => painted.push(performance.timeOrigin + performance.now())),
        );
    };
    new MutationObserver(look).observe(document, { subtree: true, childList: true, characterData: true });
  });
  return {
    paintedAtMs: () => page.evaluate(() => /** @type {any} */ (globalThis).painted),
    close: () => browser.close(),
  };
}
