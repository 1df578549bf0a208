import { createServer, type Server } from 'node:http';
import type { RequestHandler } from 'express';
import { type DestinationStream, type Logger, pino } from 'pino';
import { pinoHttp } from 'pino-http';
import { AppError } from '../shared/errors.ts';
import { createApp } from './app.ts';
import { createIdentity } from './auth/identity.ts';
import { readOrMakeSecret } from './auth/secret.ts';
import type { Config } from './config.ts';
import type { Services } from './features/services.ts';
import { systemClock } from './jobs/clock.ts';
import { createMailDelivery } from './mail/delivery.ts';
import { smtpTransport } from './mail/transport.ts';
import { openServices } from './open-services.ts';
import { startMailCatcher } from './stand-ins/mail-catcher/mail-catcher.ts';

export interface ServeOptions {
  config: Config;
  /** Serves the client; given the HTTP server, for those who need its sockets. */
  site(server: Server): Promise<RequestHandler[]> | RequestHandler[];
  isDevelopment?: boolean;
}

export interface RunningServer {
  address: string;
  services: Services;
  /** Where the demo's mails are shown. */
  mailCatcher: string | null;
  /** For the first admin, while there is none. */
  setUpCode(): string | null;
  /** Answers what is in hand, gives the job that runs back to the queue and closes the database. */
  close(): Promise<void>;
}

const secondsToAnswer = 3;

/** Opens everything, starts the job runner and listens. */
export async function serve(options: ServeOptions): Promise<RunningServer> {
  const { config } = options;
  const logger = createLogger(config);
  let address = config.publicAddress ?? '';
  const { client, services } = openServices({
    databaseFile: config.databaseFile,
    lanes: config.lanes,
    allowsLocalPaths: config.allowsLocalPaths,
    address: () => address,
    onJobError: (job, error) => logger.error({ err: error, job: job.id, subject: job.subject }, 'job failed'),
  });
  const identity = createIdentity({
    client,
    services,
    secret: readOrMakeSecret(config.dataFolder, config.authSecret),
    isSecure: config.isSecure,
    hasDemo: config.hasDemo,
    signUp: config.signUp,
  });
  const isCatching = config.hasDemo && config.smtpAddress === undefined;
  const catcher = isCatching ? await startMailCatcher({ page: config.mailCatcherPort }) : null;
  const delivery = startDelivery(config, services, catcher?.smtpAddress, logger);
  const server = createServer();
  const app = createApp({
    services,
    identity,
    logger,
    trustedProxies: config.trustedProxies,
    mailCatcher: () => catcher?.pageAddress ?? null,
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
  const bound = addressOf(server, config);
  address = config.publicAddress ?? bound;
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
    await delivery?.stop();
    await catcher?.close();
    await closed;
    clearTimeout(timer);
    client.close();
  }
  return {
    address: bound,
    services,
    mailCatcher: catcher?.pageAddress ?? null,
    setUpCode: () => (identity.setUp.isOpen() ? identity.setUp.code : null),
    close,
  };
}

/** What signs somebody in is in no log: cookies and tokens are left out of what is written of requests. */
export function createLogger(
  { logLevel }: Pick<Config, 'logLevel'>,
  destination?: DestinationStream,
): Logger {
  const redact = {
    paths: ['req.headers.authorization', 'req.headers.cookie', 'res.headers["set-cookie"]'],
    censor: '(left out)',
  };
  return destination
    ? pino({ level: logLevel, base: null, redact }, destination)
    : pino({ level: logLevel, base: null, redact });
}

/** Sends what is in the outbox, where there is a mail server; without one it waits. */
function startDelivery(config: Config, services: Services, catcher: string | undefined, logger: Logger) {
  const server = config.smtpAddress ?? catcher;
  if (server === undefined) {
    logger.warn('no mail server is set (SMTP_URL): mails wait in the outbox');
    return undefined;
  }
  const { outbox, mail } = services;
  const delivery = createMailDelivery({
    outbox,
    mail,
    transport: smtpTransport(server, config.mailFrom),
    clock: systemClock,
    onError: (error, id, attempts) => {
      const reason = error instanceof Error ? error.message : String(error);
      logger.warn({ mail: id, attempts, reason }, 'a mail could not be sent; it will be tried again');
    },
  });
  delivery.start();
  return delivery;
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

/** Tells who can read this output how to become the first admin. */
export function saySetUp(running: RunningServer): void {
  const code = running.setUpCode();
  if (code !== null)
    process.stdout.write(
      `Nobody has an account yet. Set up the site at ${running.address}/set-up with the code ${code}\n`,
    );
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
