import { createServer as createViteServer } from 'vite';
import { projectFolder } from './build-client.ts';
import { readConfig } from './config.ts';
import { seedDemoOnce } from './seed-demo.ts';
import { closeOnSignals, runMain, saySetUp, serve } from './serve.ts';

/** The server with the client from its sources, which change in the browser as they are edited. */
await runMain(async () => {
  const config = readConfig();
  const running = await serve({
    config,
    isDevelopment: true,
    async site(server) {
      const vite = await createViteServer({
        root: projectFolder,
        server: { middlewareMode: true, hmr: { server } },
      });
      return [vite.middlewares];
    },
  });
  closeOnSignals(running);
  process.stdout.write(`Tallyroot (development) is at ${running.address}\n`);
  if (await seedDemoOnce(config, running.services)) process.stdout.write('The demo is in place.\n');
  if (running.mailCatcher) process.stdout.write(`Its mails are shown at ${running.mailCatcher}\n`);
  saySetUp(running);
});
