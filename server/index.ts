import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { readConfig } from './config.ts';
import { staticSite } from './http/static-site.ts';
import { closeOnSignals, runMain, saySetUp, serve } from './serve.ts';

/** The server alone, with the client as it was built last. */
await runMain(async () => {
  const dist = fileURLToPath(new URL('../dist', import.meta.url));
  const site = () => (existsSync(dist) ? staticSite(dist) : []);
  const running = await serve({ config: readConfig(), site });
  closeOnSignals(running);
  process.stdout.write(`Tallyroot is at ${running.address}\n`);
  saySetUp(running);
});
