import { availableParallelism } from 'node:os';
import path from 'node:path';
import { z } from 'zod';
import { AppError } from '../shared/errors.ts';
import { issuesOf } from './http/parse-request.ts';

const port = z.coerce.number().int().min(0).max(65_535);

/** One name a comma, blanks around them do not matter. */
const names = z
  .string()
  .default('')
  .transform((text) =>
    text
      .split(',')
      .map((name) => name.trim())
      .filter((name) => name !== ''),
  );

const environmentVariables = z.object({
  PORT: port.default(5170),
  /** Loopback unless somebody decides otherwise: there is no sign-in, and builds are programs. */
  HOST: z.string().min(1).default('127.0.0.1'),
  /** Host names, besides localhost, under which a browser reaches the server. */
  ALLOWED_HOSTS: names,
  DATA_DIR: z.string().min(1).default('data'),
  LANES: z.coerce.number().int().min(1).max(64).optional(),
  DEMO: z.enum(['on', 'off']).optional(),
  /** Whether people may name folders and repositories of this machine. */
  LOCAL_PATHS: z.enum(['on', 'off']).optional(),
  LOG_LEVEL: z.enum(['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent']).default('info'),
});

export interface Config {
  port: number;
  host: string;
  allowedHosts: string[];
  dataFolder: string;
  databaseFile: string;
  /** Adapters that run side by side. */
  lanes: number;
  hasDemo: boolean;
  allowsLocalPaths: boolean;
  logLevel: z.output<typeof environmentVariables>['LOG_LEVEL'];
}

/** Where programs are found: the one variable that adapters get from Tallyroot's own environment. */
export const searchPath = process.env.PATH ?? '/usr/bin:/bin';

function isLoopback(host: string): boolean {
  return host === 'localhost' || host === '::1' || host.startsWith('127.');
}

/** Reads the environment once; nothing else looks at it. */
export function readConfig(env: Record<string, string | undefined> = process.env): Config {
  const parsed = environmentVariables.safeParse(env);
  if (!parsed.success) {
    const issues = issuesOf(parsed.error);
    const text = issues.map((issue) => `${issue.path}: ${issue.message}`).join('; ');
    throw new AppError('invalid', `The environment cannot be used: ${text}`, { issues });
  }
  const { PORT, HOST, ALLOWED_HOSTS, DATA_DIR, LANES, DEMO, LOCAL_PATHS, LOG_LEVEL } = parsed.data;
  const dataFolder = path.resolve(DATA_DIR);
  return {
    port: PORT,
    host: HOST,
    allowedHosts: ALLOWED_HOSTS,
    dataFolder,
    databaseFile: path.join(dataFolder, 'tallyroot.db'),
    // One processor is left to the evaluator and the web server.
    lanes: LANES ?? Math.max(1, Math.min(4, availableParallelism() - 1)),
    hasDemo: DEMO !== 'off',
    // Whoever asked for the demo looks round; a server that others reach has to say so by itself.
    allowsLocalPaths: LOCAL_PATHS === undefined ? isLoopback(HOST) || DEMO === 'on' : LOCAL_PATHS === 'on',
    logLevel: LOG_LEVEL,
  };
}
