import type { Browser, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  axeFindings,
  type DemoSite,
  launchBrowser,
  openPage,
  sidewaysScroll,
  signIn,
  startDemoSite,
} from './browser.ts';

let site: DemoSite;
let browser: Browser;
/** Addresses that the reader came by, in order. */
const visited: string[] = [];

beforeAll(async () => {
  browser = await launchBrowser();
  site = await startDemoSite();
}, 240_000);
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

async function heading(page: Page, part: string): Promise<void> {
  await page.getByRole('heading', { level: 1 }).filter({ hasText: part }).waitFor();
  const { pathname, search } = new URL(page.url());
  visited.push(pathname + search);
}

describe('a contributor in the browser', () => {
  it('goes from the library to what the build did, and to the path that shows why', async () => {
    const { page, context, errors } = await openPage(browser, { width: 1440, scheme: 'light' });
    await signIn(context, site, 'Tobin Askeland');
    await page.goto(`${site.address}/libraries`);
    await page.getByRole('link', { name: 'larkroots' }).first().click();
    const row = page.getByRole('row').filter({ hasText: 'One chord step for all solvers' });
    await row.waitFor();
    await heading(page, '');
    await row.getByRole('link').first().click();
    await heading(page, 'declares 6 solvers');
    const run = page.getByRole('row').filter({ hasText: 'hard-dozen' });
    await run.getByRole('link', { name: /^run \d+/ }).click();
    await heading(page, 'solved');
    await page
      .getByRole('link', { name: /Read the comparison/ })
      .first()
      .click();
    await heading(page, 'hybrid no longer solves flat-shoulder');
    const text = await page.locator('main').textContent();
    expect(text).toContain('beyond allowances');
    expect(text).toMatch(
      /secant needs [\d.]+\s?% more evaluations: in all 12 of its solves it asks for f again/,
    );
    await page
      .getByRole('link', { name: /secant on sqrt-three/ })
      .first()
      .click();
    await heading(page, 'secant');
    const solve = await page.locator('main').textContent();
    expect(solve).toContain('again, as in 2');
    expect(solve).toContain('1.732050807568877');
    expect(errors).toEqual([]);
    await context.close();
  });

  it('finds no breach of WCAG 2.2 AA on the pages of that way, light and dark, wide and narrow', async () => {
    expect(visited.length).toBeGreaterThanOrEqual(5);
    for (const view of [
      { width: 1440, scheme: 'light' },
      { width: 390, scheme: 'dark' },
    ] as const) {
      const { page, context } = await openPage(browser, view);
      await signIn(context, site, 'Tobin Askeland');
      for (const path of [...new Set(visited), '/suites', '/suites/hard-dozen']) {
        await page.goto(site.address + path);
        await page.getByRole('heading', { level: 1 }).waitFor();
        await page.waitForLoadState('networkidle');
        expect(await axeFindings(page), `${path} at ${view.width}, ${view.scheme}`).toEqual([]);
      }
      await context.close();
    }
  });

  it('scrolls nothing sideways at 360 px', async () => {
    const { page, context } = await openPage(browser, { width: 360, scheme: 'light' });
    await signIn(context, site, 'Tobin Askeland');
    for (const path of [...new Set(visited), '/suites', '/suites/hard-dozen']) {
      await page.goto(site.address + path);
      await page.getByRole('heading', { level: 1 }).waitFor();
      await page.waitForLoadState('networkidle');
      expect(await sidewaysScroll(page), path).toBe(0);
    }
    await context.close();
  });

  it('walks a comparison by keyboard alone: j to the next pair, enter opens it, escape goes back', async () => {
    const { page, context } = await openPage(browser, { width: 1440, scheme: 'light' });
    await signIn(context, site, 'Tobin Askeland');
    const comparison = visited.find((path) => path.includes('comparison')) ?? '';
    await page.goto(site.address + comparison);
    await page
      .getByRole('link', { name: /hybrid on flat-shoulder/ })
      .first()
      .waitFor();
    await page.keyboard.press('j');
    const first = await page.evaluate(() => document.activeElement?.textContent ?? '');
    await page.keyboard.press('j');
    const second = await page.evaluate(() => document.activeElement?.textContent ?? '');
    expect(first).toMatch(/ on /);
    expect(second).toMatch(/ on /);
    expect(second).not.toBe(first);
    await page.keyboard.press('k');
    expect(await page.evaluate(() => document.activeElement?.textContent ?? '')).toBe(first);
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/solves\//);
    await page.getByRole('heading', { level: 1 }).waitFor();
    await page.keyboard.press('Escape');
    await page.waitForURL(/comparison/);
    await context.close();
  });
});
