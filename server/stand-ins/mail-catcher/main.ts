import { parseArgs } from 'node:util';
import { startMailCatcher } from './mail-catcher.ts';

/** The mail catcher alone: `tsx server/stand-ins/mail-catcher/main.ts --smtp 2525 --page 5175`. */
const { values } = parseArgs({
  options: { smtp: { type: 'string', default: '2525' }, page: { type: 'string', default: '5175' } },
});
const catcher = await startMailCatcher({ smtp: Number(values.smtp), page: Number(values.page) });
process.stdout.write(`Mails are taken at ${catcher.smtpAddress} and shown at ${catcher.pageAddress}\n`);
for (const signal of ['SIGINT', 'SIGTERM'] as const)
  process.once(signal, () => {
    void catcher.close().then(() => process.exit(0));
  });
