import { mkdir } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import axe from 'axe-core';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';

/** What a person holds the screen at; landscape tablet first. */
export const sizes = {
  tablet: { width: 1280, height: 800 },
  'small-tablet': { width: 1024, height: 768 },
  portrait: { width: 800, height: 1280 },
  phone: { width: 390, height: 844 },
  desktop: { width: 1440, height: 900 },
} as const;

const grounds = { day: 'light', night: 'dark' } as const;

/**
 * Debian's Chromium, kept from looking for anything outside this machine.
 * @param home of the person, where it looks for what they trust
 */
export function openBrowser(flags: readonly string[] = [], home?: string): Promise<Browser> {
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
    env: { ...process.env, ...(home === undefined ? {} : { HOME: home }) },
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      ...flags,
    ],
  });
}

export type DemoRole = 'owner' | 'brewer' | 'hand' | 'taster' | 'pourer';

/** A device of its own, signed in to the demo house. Page errors end the test that made them. */
export async function signedIn(
  browser: Browser,
  url: string,
  role: DemoRole,
): Promise<{ context: BrowserContext; page: Page }> {
  const context = await browser.newContext({ viewport: sizes.tablet });
  const page = await context.newPage();
  page.on('pageerror', (error) => {
    throw error;
  });
  await page.goto(url);
  await page.getByLabel('E-mail').fill(`${role}@wrenfold.example`);
  await page.getByLabel('Password', { exact: true }).fill(`wrenfold-${role}`);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByLabel('E-mail').waitFor({ state: 'detached' });
  return { context, page };
}

export interface Finding {
  shot: string;
  rule: string;
  where: string;
}

interface PictureChecks {
  /** What the person has to read there must not lie under the buttons of the run sheet. */
  isClearOfActBar?: boolean;
}

/**
 * A picture of the screen as it is now at every size and on both grounds, and what axe finds on it. The clock of a rehearsal should stand
 * nearly still meanwhile.
 */
export async function picture(page: Page, name: string, checks: PictureChecks = {}): Promise<Finding[]> {
  const findings: Finding[] = [];
  for (const [ground, colorScheme] of Object.entries(grounds)) {
    await page.emulateMedia({ colorScheme });
    for (const [size, viewport] of Object.entries(sizes)) {
      await page.setViewportSize(viewport);
      await page.evaluate(() => document.fonts.ready.then(() => undefined));
      const shot = `${name}-${size}-${ground}`;
      const path = join(import.meta.dirname, 'screenshots', `${shot}.png`);
      await mkdir(dirname(path), { recursive: true });
      await page.screenshot({ path, animations: 'disabled' });
      findings.push(...(await axeOn(page, shot)));
      findings.push(...(await overflowOn(page, shot)));
      if (checks.isClearOfActBar) findings.push(...(await coveredOn(page, shot)));
    }
  }
  await page.setViewportSize(sizes.tablet);
  return findings;
}

async function axeOn(page: Page, shot: string): Promise<Finding[]> {
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate(() =>
    (globalThis as unknown as { axe: typeof axe }).axe.run(document, { resultTypes: ['violations'] }),
  );
  return violations.flatMap(({ id, nodes }) =>
    nodes.map((node) => ({ shot, rule: id, where: `${node.target.join(' ')}: ${node.failureSummary ?? ''}` })),
  );
}

/** A page that can be pushed sideways is broken at that size. */
async function overflowOn(page: Page, shot: string): Promise<Finding[]> {
  const { scrollWidth, clientWidth } = await page.evaluate(() => {
    const { scrollWidth: whole, clientWidth: seen } = document.documentElement;
    return { scrollWidth: whole, clientWidth: seen };
  });
  return scrollWidth > clientWidth
    ? [{ shot, rule: 'no-sideways-scroll', where: `${scrollWidth} px in ${clientWidth} px` }]
    : [];
}

/** The words and numbers of the step that the buttons cover. */
async function coveredOn(page: Page, shot: string): Promise<Finding[]> {
  const covered = await page.evaluate(() => {
    const barTop = document.querySelector('.act-bar')?.getBoundingClientRect().top;
    if (barTop === undefined) return [];
    return [...document.querySelectorAll('.step-title, .step-amounts, .take-over-amounts, .countdown')].flatMap(
      (part) => {
        const { bottom } = part.getBoundingClientRect();
        return bottom > barTop + 0.5 ? [`${part.className}: ${Math.round(bottom - barTop)} px`] : [];
      },
    );
  });
  return covered.map((where) => ({ shot, rule: 'clear-of-act-bar', where }));
}
