/** Screenshots of every screen at 1440 and 390 px, light and dark, into `.screens/`, from the demo as it runs. */
import { mkdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { launchBrowser, openPage, signIn, startDemoSite } from './browser.ts';

const folder = fileURLToPath(new URL('../../.screens/', import.meta.url));
const signedOut = ['/sign-in', '/forgotten-password'];
const signedIn = [
  '/',
  '/libraries',
  '/libraries/larkroots',
  '/libraries/larkroots/settings',
  '/libraries/larkroots/settings/members',
  '/libraries/larkroots/settings/tokens',
  '/libraries/larkroots/settings/allowances',
  '/libraries/larkroots/settings/log',
  '/libraries/larkroots/register',
  '/new-library',
  '/builds/9',
  '/runs/10',
  '/runs/10/comparison',
  '/suites',
  '/suites/hard-dozen',
  '/suites/hard-dozen/cases/orbit',
  '/guide',
  '/guide/wire',
  '/account',
];
const forAdmins = ['/site', '/site/lanes', '/site/mail', '/site/log'];

const site = await startDemoSite();
const browser = await launchBrowser();
mkdirSync(folder, { recursive: true });
for (const width of [1440, 390]) {
  for (const scheme of ['light', 'dark'] as const) {
    const { page, context, errors } = await openPage(browser, { width, scheme });
    const shoot = async (path: string): Promise<void> => {
      await page.goto(site.address + path);
      await page.getByRole('heading', { level: 1 }).waitFor();
      await page.waitForLoadState('networkidle');
      const name = path.replace(/\W+/g, '-').replace(/^-|-$/g, '') || 'overview';
      await page.screenshot({ path: `${folder}${name}-${width}-${scheme}.png`, fullPage: true });
      process.stdout.write(
        `${name} ${width} ${scheme}${errors.length > 0 ? `: ${errors.splice(0).join('; ')}` : ''}\n`,
      );
    };
    for (const path of signedOut) await shoot(path);
    await signIn(context, site, 'Maud Ferreday');
    for (const path of signedIn) await shoot(path);
    const comparison = page.getByRole('link', { name: /secant on sqrt-three/ });
    await page.goto(`${site.address}/runs/10/comparison`);
    const solve = await comparison.first().getAttribute('href');
    if (solve !== null) await shoot(solve.split('&back')[0] ?? solve);
    await signIn(context, site, 'Jonna Petterwick');
    for (const path of forAdmins) await shoot(path);
    await context.close();
  }
}
await browser.close();
await site.close();
