import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { execa } from 'execa';
import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';

const root = fileURLToPath(new URL('../..', import.meta.url));
const executablePath = '/usr/bin/chromium';
const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

/** False on a machine without Debian's Chromium; `npm test` installs it when run as root. */
export const hasChromium = existsSync(executablePath);

export interface DemoSite {
  address: string;
  close(): Promise<void>;
}

/** The product as `npm start` starts it, on an empty data folder, once its demo is in place. */
export async function startDemoSite(): Promise<DemoSite> {
  const data = mkdtempSync(join(tmpdir(), 'tallyroot-e2e-'));
  const server = execa('node', ['--import', 'tsx', 'server/start.ts'], {
    cwd: root,
    env: { DATA_DIR: data, PORT: '0', MAIL_CATCHER_PORT: '0', DEMO: 'on' },
    reject: false,
    all: true,
  });
  const address = await new Promise<string>((resolve, reject) => {
    let said = '';
    let found = '';
    server.all.on('data', (chunk: Buffer) => {
      said += chunk.toString();
      found = /Tallyroot is at (http:\/\/\S+)/.exec(said)?.[1] ?? found;
      if (said.includes('The demo is in place.')) resolve(found);
    });
    server.then(() => reject(new Error(`The server ended: ${said}`)));
  });
  return {
    address,
    async close() {
      server.kill('SIGTERM');
      await server;
      rmSync(data, { recursive: true, force: true });
    },
  };
}

export async function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath,
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  });
}

export interface View {
  width: number;
  scheme: 'light' | 'dark';
}

/** A page of the given width and scheme; errors that it logs or throws are collected. */
export async function openPage(
  browser: Browser,
  { width, scheme }: View,
): Promise<{ page: Page; context: BrowserContext; errors: string[] }> {
  const context = await browser.newContext({ viewport: { width, height: 900 }, colorScheme: scheme });
  const page = await context.newPage();
  const errors: string[] = [];
  page.on('pageerror', (error) => errors.push(String(error)));
  page.on('console', (message) => {
    if (message.type() === 'error') errors.push(message.text());
  });
  return { page, context, errors };
}

/** Signs in one of the demo's people, as the sign-in page does. */
export async function signIn(context: BrowserContext, site: DemoSite, name: string): Promise<void> {
  const headers = { origin: site.address };
  const people = await (await context.request.get(`${site.address}/api/demo/people`, { headers })).json();
  const person = people.items.find((one: { name: string }) => one.name === name);
  if (person === undefined) throw new Error(`The demo has nobody called ${name}.`);
  const answer = await context.request.post(`${site.address}/api/demo/sign-in`, {
    headers,
    data: { person: person.id },
  });
  if (!answer.ok()) throw new Error(`Signing in answered ${answer.status()}: ${await answer.text()}`);
}

/** Rules of WCAG 2 A and AA, 2.1 AA and 2.2 AA that the page breaks, each with the first place. */
export async function axeFindings(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  return page.evaluate(async () => {
    const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
    const found = await Reflect.get(window, 'axe').run(document, { runOnly: { type: 'tag', values: tags } });
    return found.violations.map(
      (rule: { id: string; nodes: { html: string }[] }) => `${rule.id}: ${rule.nodes[0]?.html.slice(0, 160)}`,
    );
  });
}

/** Pixels by which the page can be scrolled sideways. */
export function sidewaysScroll(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
}
