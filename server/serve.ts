import { createServer, type Server } from 'node:http';
import type { RequestHandler } from 'express';
import { pino } from 'pino';
import { pinoHttp } from 'pino-http';
import { AppError } from '../shared/errors.ts';
import { createApp } from './app.ts';
import type { Config } from './config.ts';
import type { Services } from './features/services.ts';
import { openServices } from './open-services.ts';

export interface ServeOptions {
  config: Config;
  /** Serves the client; given the HTTP server, for those who need its sockets. */
  site(server: Server): Promise<RequestHandler[]> | RequestHandler[];
  isDevelopment?: boolean;
}

export interface RunningServer {
  address: string;
  services: Services;
  /** Answers what is in hand, gives the job that runs back to the queue and closes the database. */
  close(): Promise<void>;
}

const secondsToAnswer = 3;

/** Opens everything, starts the job runner and listens. */
export async function serve(options: ServeOptions): Promise<RunningServer> {
  const { config } = options;
  const logger = pino({ level: config.logLevel, base: null });
  const { client, services } = openServices({
    databaseFile: config.databaseFile,
    lanes: config.lanes,
    allowsLocalPaths: config.allowsLocalPaths,
    onJobError: (job, error) => logger.error({ err: error, job: job.id, subject: job.subject }, 'job failed'),
  });
  const server = createServer();
  const app = createApp({
    services,
    logger,
    allowedHosts: config.allowedHosts,
    isDevelopment: options.isDevelopment ?? false,
    requestLog: pinoHttp({
      logger,
      genReqId: (_request, response) => String(response.getHeader('x-request-id') ?? ''),
      // What is unexpected is logged by the error handler, with its stack.
      customLogLevel: () => 'debug',
    }),
    site: await options.site(server),
  });
  server.on('request', app);
  await listen(server, config);
  services.jobRunner.start();
  services.buildPreviews
    .sweep()
    .catch((error: unknown) => logger.warn({ err: error }, 'files that nothing needs were not removed'));

  async function close(): Promise<void> {
    const closed = new Promise<void>((resolve) => server.close(() => resolve()));
    server.closeIdleConnections();
    // Event streams never end by themselves.
    const timer = setTimeout(() => server.closeAllConnections(), secondsToAnswer * 1000);
    services.bus.close();
    await services.jobRunner.stop();
    await closed;
    clearTimeout(timer);
    client.close();
  }
  return { address: addressOf(server, config), services, close };
}

async function listen(server: Server, { host, port }: Config): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', (error) => {
      const isTaken = 'code' in error && error.code === 'EADDRINUSE';
      const message = `Port ${port} on ${host} is taken; set PORT to another one.`;
      reject(isTaken ? new AppError('unavailable', message, { cause: error }) : error);
    });
    server.listen(port, host, resolve);
  });
}

function addressOf(server: Server, config: Config): string {
  const bound = server.address();
  const port = typeof bound === 'object' && bound !== null ? bound.port : config.port;
  const host = config.host.includes(':') ? `[${config.host}]` : config.host;
  return `http://${host}:${port}`;
}

/** Closes on the first signal to end; the second one does not wait. */
export function closeOnSignals(running: RunningServer): void {
  let isClosing = false;
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.on(signal, () => {
      if (isClosing) process.exit(130);
      isClosing = true;
      running.close().then(
        () => process.exit(0),
        (error: unknown) => {
          process.stderr.write(`${error instanceof Error ? error.stack : String(error)}\n`);
          process.exit(1);
        },
      );
    });
}

/** Runs the main part of a program: an expected failure is a sentence, anything else has its stack. */
export async function runMain(main: () => Promise<void>): Promise<void> {
  try {
    await main();
  } catch (error) {
    const text =
      error instanceof AppError ? error.message : error instanceof Error ? error.stack : String(error);
    process.stderr.write(`${text}\n`);
    process.exit(1);
  }
}
