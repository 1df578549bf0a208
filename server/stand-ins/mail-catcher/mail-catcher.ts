import { createServer as createHttpServer } from 'node:http';
import { type AddressInfo, createServer, type Server, type Socket } from 'node:net';
import { mailsPage } from './page.ts';
import { readMail } from './read-mail.ts';
import { SmtpConversation } from './smtp-lines.ts';

export interface CaughtMail {
  id: number;
  from: string;
  to: string[];
  subject: string;
  text: string;
  /** ISO 8601. */
  at: string;
}

export interface MailCatcher {
  /** For whoever sends mail. */
  smtpAddress: string;
  /** For people. */
  pageAddress: string;
  mails(): readonly CaughtMail[];
  close(): Promise<void>;
}

const host = '127.0.0.1';
const mostKept = 200;
const patienceMs = 60_000;

async function listen(server: Server, port: number): Promise<number> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => {
      server.off('error', reject);
      resolve();
    });
  });
  const bound: AddressInfo | string | null = server.address();
  return typeof bound === 'object' && bound !== null ? bound.port : port;
}

/** Any port where the wanted one is taken: another one may be running. */
async function listenNear(server: Server, port: number): Promise<number> {
  try {
    return await listen(server, port);
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'EADDRINUSE')) throw error;
    return listen(server, 0);
  }
}

/** A mail server that delivers nothing: it keeps what it is given and shows it on a page. For this machine alone. */
export async function startMailCatcher(ports: { smtp?: number; page?: number } = {}): Promise<MailCatcher> {
  const mails: CaughtMail[] = [];
  const sockets = new Set<Socket>();
  let count = 0;

  const smtp = createServer((socket) => {
    sockets.add(socket);
    const conversation = new SmtpConversation(({ from, to }, data) => {
      count += 1;
      mails.push({ id: count, from, to, at: new Date().toISOString(), ...readMail(data) });
      if (mails.length > mostKept) mails.shift();
    });
    socket.setTimeout(patienceMs, () => socket.destroy());
    socket.on('error', () => socket.destroy());
    socket.on('close', () => sockets.delete(socket));
    socket.on('data', (piece) => {
      for (const { text, isLast } of conversation.take(piece)) {
        if (isLast) socket.end(`${text}\r\n`);
        else socket.write(`${text}\r\n`);
      }
    });
    socket.write(`${conversation.greeting}\r\n`);
  });
  const page = createHttpServer((request, response) => {
    // Another site can point its own name here; it would then read links that sign people in.
    const isOurs = /^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? '');
    const isPage = isOurs && request.method === 'GET' && request.url === '/';
    response.writeHead(isPage ? 200 : 404, {
      'Content-Type': 'text/html; charset=utf-8',
      'Cache-Control': 'no-store',
      'Referrer-Policy': 'no-referrer',
      'X-Content-Type-Options': 'nosniff',
      'Content-Security-Policy': "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'none'",
    });
    response.end(isPage ? mailsPage(mails) : 'Nothing here.\n');
  });

  const smtpPort = await listenNear(smtp, ports.smtp ?? 0);
  const pagePort = await listenNear(page, ports.page ?? 0);
  return {
    smtpAddress: `smtp://${host}:${smtpPort}`,
    pageAddress: `http://${host}:${pagePort}`,
    mails: () => mails,
    async close() {
      for (const socket of sockets) socket.destroy();
      page.closeAllConnections();
      await Promise.all(
        [smtp, page].map((one) => new Promise<void>((resolve) => one.close(() => resolve()))),
      );
    },
  };
}
