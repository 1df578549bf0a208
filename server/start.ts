import { buildClient, clientFolder, isClientStale } from './build-client.ts';
import { readConfig } from './config.ts';
import { staticSite } from './http/static-site.ts';
import { seedDemoOnce } from './seed-demo.ts';
import { closeOnSignals, runMain, saySetUp, serve } from './serve.ts';

/** Everything for a first look: builds the client where needed, serves, and fills an empty database. */
await runMain(async () => {
  const config = readConfig();
  const say = (text: string) => process.stdout.write(`${text}\n`);
  if (await isClientStale()) {
    say('Building the pages …');
    await buildClient();
  }
  const running = await serve({ config, site: () => staticSite(clientFolder) });
  closeOnSignals(running);
  say(`Tallyroot is at ${running.address}`);
  if (running.mailCatcher) say(`Its mails are shown at ${running.mailCatcher}`);
  if (await seedDemoOnce(config, running.services)) say('The demo is in place.');
  saySetUp(running);
});
