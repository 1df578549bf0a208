import type { Browser } from 'playwright-core';
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
const settings = '/libraries/larkroots/settings';

beforeAll(async () => {
  browser = await launchBrowser();
  site = await startDemoSite();
}, 240_000);
afterAll(async () => {
  await browser?.close();
  await site?.close();
});

describe('signing in', () => {
  it('leads to where one wanted to be, and out again to the door', async () => {
    const { page, context, errors } = await openPage(browser, { width: 1440, scheme: 'light' });
    await page.goto(`${site.address}${settings}/members?x=1`);
    await page.waitForURL(/\/sign-in\?back=/);
    await page.getByRole('button', { name: /^Enter as Maud Ferreday/ }).click();
    await page.waitForURL(/\/settings\/members\?x=1$/);
    await page.getByRole('button', { name: 'Maud Ferreday' }).click();
    await page.getByRole('button', { name: 'Sign out' }).click();
    await page.waitForURL(/\/sign-in$/);
    await page.goto(`${site.address}/libraries`);
    await page.waitForURL(/\/sign-in\?back=/);
    expect(errors).toEqual([]);
    await context.close();
  });

  it('ends everywhere at once where the session ends, whatever page is open', async () => {
    const { page, context } = await openPage(browser, { width: 1440, scheme: 'light' });
    await signIn(context, site, 'Orla Brandvik');
    await page.goto(`${site.address}/libraries`);
    await page.getByRole('link', { name: 'larkroots' }).first().waitFor();
    await context.clearCookies();
    await page.getByRole('link', { name: 'larkroots' }).first().click();
    await page.waitForURL(/\/sign-in\?back=%2Flibraries%2Flarkroots$/);
    await context.close();
  });
});

describe('roles', () => {
  it('are not offered what they may not do, and are told who may', async () => {
    const { page, context } = await openPage(browser, { width: 1440, scheme: 'light' });
    await signIn(context, site, 'Tobin Askeland');
    await page.goto(`${site.address}${settings}/allowances`);
    await page.getByText('Maintainers of the library set them.').waitFor();
    expect(await page.getByRole('button', { name: 'Set the allowances' }).count()).toBe(0);
    expect(await page.getByRole('link', { name: 'Bot tokens' }).count()).toBe(0);
    await page.goto(`${site.address}${settings}/tokens`);
    await page.getByText('Its maintainers make and revoke tokens.').waitFor();
    await page.goto(`${site.address}/site`);
    await page.getByText('This is for the admins of the site').waitFor();
    await context.close();
  });
});

describe('allowances', () => {
  it('show at once what the newest comparisons would say, and hold once they are set', async () => {
    const { page, context, errors } = await openPage(browser, { width: 1440, scheme: 'light' });
    await signIn(context, site, 'Maud Ferreday');
    await page.goto(`${site.address}${settings}/allowances`);
    const row = page.getByRole('row').filter({ hasText: 'One chord step for all solvers' });
    await row.waitFor();
    expect(await row.getByText('beyond', { exact: true }).count()).toBe(2);
    for (const [label, text] of [
      ['broke, pairs', 'no limit'],
      ['in total, % more', 'no limit'],
      ['on one case, evaluations more', 'no limit'],
      ['accuracy, digits fewer', 'no limit'],
    ])
      await page.getByLabel(`${label}, all solvers`).fill(text ?? '');
    await row.getByText('nothing is beyond them').waitFor();
    expect(await row.getByText('within', { exact: true }).count()).toBe(1);
    await page.getByLabel('Why').fill('To see how it reads.');
    await page.getByRole('button', { name: 'Set the allowances' }).click();
    await page.getByText('These are the ones that hold.').waitFor();
    await page.getByText('Maud Ferreday:').waitFor();
    expect(await row.getByText('within', { exact: true }).count()).toBe(2);
    expect(errors).toEqual([]);
    await context.close();
  });
});

describe('the list to go anywhere', () => {
  it('is reached, searched and left by keyboard alone', async () => {
    const { page, context } = await openPage(browser, { width: 1440, scheme: 'light' });
    await signIn(context, site, 'Tobin Askeland');
    await page.goto(`${site.address}/account`);
    await page.getByRole('heading', { level: 1 }).waitFor();
    const field = page.getByRole('combobox', { name: 'Library, build, suite, case or page' });
    await page.keyboard.press('Control+k');
    await field.waitFor();
    await page.keyboard.type('flat-shoulder');
    await page.getByRole('option', { name: /flat-shoulder/ }).waitFor();
    await page.keyboard.press('Enter');
    await page.waitForURL(/\/cases\/flat-shoulder$/);
    await page.keyboard.press('Control+k');
    await field.waitFor();
    await page.keyboard.press('Escape');
    await field.waitFor({ state: 'detached' });
    await page.keyboard.press('?');
    await page.getByRole('dialog', { name: 'Keys' }).waitFor();
    await context.close();
  });
});

describe('pages of the door, the settings, the site and the account', () => {
  it('break no rule of WCAG 2.2 AA and scroll nothing sideways, wide and at 360 px, light and dark', async () => {
    const ways = [
      { who: null, paths: ['/sign-in', '/sign-up', '/forgotten-password', '/reset-password#token=x'] },
      {
        who: 'Maud Ferreday',
        paths: [
          '/',
          '/new-library',
          '/account',
          ...['', '/members', '/tokens', '/allowances', '/log'].map((page) => settings + page),
        ],
      },
      { who: 'Jonna Petterwick', paths: ['/site', '/site/lanes', '/site/mail', '/site/log'] },
    ];
    for (const view of [
      { width: 1440, scheme: 'dark' },
      { width: 360, scheme: 'light' },
    ] as const) {
      for (const { who, paths } of ways) {
        const { page, context } = await openPage(browser, view);
        if (who !== null) await signIn(context, site, who);
        for (const path of paths) {
          await page.goto(site.address + path);
          await page.getByRole('heading', { level: 1 }).waitFor();
          await page.waitForLoadState('networkidle');
          expect(await axeFindings(page), `${path} at ${view.width}, ${view.scheme}`).toEqual([]);
          expect(await sidewaysScroll(page), `${path} at ${view.width}`).toBe(0);
        }
        await context.close();
      }
    }
  });
});
