import { afterEach, describe, expect, it, vi } from 'vitest';
import { createMailDelivery, type MailDelivery, pauseMs } from '../../../server/mail/delivery.ts';
import { confirmAddressMail, invitationMail } from '../../../server/mail/templates.ts';
import { type MailTransport, type OutgoingMail, smtpTransport } from '../../../server/mail/transport.ts';
import { type MailCatcher, startMailCatcher } from '../../../server/stand-ins/mail-catcher/mail-catcher.ts';
import { openTestApp, type TestApp } from '../../helpers/app.ts';

const link = `https://tally.example/confirm-address#token=abc.def-ghi_${'x'.repeat(300)}`;
const hostile = 'Mallory <b>\r\nBcc: all@larkmoor.example';
let catcher: MailCatcher | undefined;
const deliveries: MailDelivery[] = [];

afterEach(async () => {
  for (const delivery of deliveries.splice(0)) await delivery.stop();
  await catcher?.close();
  catcher = undefined;
});

function deliver(app: TestApp, transport: MailTransport, clock: () => number = Date.now): string[] {
  const errors: string[] = [];
  const { outbox, mail } = app.services;
  const onError = (error: unknown) => errors.push(String(error));
  const delivery = createMailDelivery({ outbox, mail, transport, clock, onError });
  deliveries.push(delivery);
  delivery.start();
  return errors;
}

const rows = (app: TestApp) => app.services.outbox.listQuery({ limit: 10 }).all();

describe('mail', () => {
  it('goes by SMTP as plain text and HTML, whole, and its text is forgotten when it is gone', async () => {
    const app = openTestApp();
    catcher = await startMailCatcher();
    deliver(app, smtpTransport(catcher.smtpAddress, 'Tallyroot <tally@larkmoor.example>'));
    app.services.mail.send('ilse@larkmoor.example', confirmAddressMail('Ilse Várga', link));
    await vi.waitFor(() => expect(rows(app)[0]?.state).toBe('sent'), { timeout: 5000 });
    expect(catcher.mails()).toMatchObject([
      { from: 'tally@larkmoor.example', to: ['ilse@larkmoor.example'], subject: 'Confirm your address' },
    ]);
    expect(catcher.mails()[0]?.text).toContain(`\r\n${link}\r\n`);
    expect(catcher.mails()[0]?.text).toContain('Hello Ilse Várga,');
    expect(rows(app)[0]).toMatchObject({ text: null, html: null, attempts: 1, error: null });
    const page = await (await fetch(catcher.pageAddress)).text();
    expect(page).toContain(`<a href="${link}"`);
  });

  it('is lost nowhere when the mail server is down: it is tried again, later and later', async () => {
    let now = 1_800_000_000_000;
    const app = openTestApp({ clock: () => now });
    const sent: OutgoingMail[] = [];
    let isDown = true;
    const transport: MailTransport = {
      async send(mail) {
        if (isDown) throw new Error('connection refused');
        sent.push(mail);
      },
      close() {},
    };
    app.services.mail.send('ilse@larkmoor.example', confirmAddressMail('Ilse', link));
    const errors = deliver(app, transport, () => now);
    await vi.waitFor(() => expect(errors).toHaveLength(1));
    await vi.waitFor(() =>
      expect(rows(app)[0]).toMatchObject({ state: 'waiting', attempts: 1, nextAt: now + 10_000 }),
    );
    expect(rows(app)[0]?.error).toBe('connection refused');
    isDown = false;
    now += 10_000;
    // Another process that starts, or the timer: whoever looks next.
    deliver(app, transport, () => now);
    await vi.waitFor(() => expect(rows(app)[0]).toMatchObject({ state: 'sent', attempts: 2 }));
    expect(sent).toHaveLength(1);
    expect([1, 2, 3, 9, 10, 70].map(pauseMs)).toEqual([
      10_000, 20_000, 40_000, 2_560_000, 3_600_000, 3_600_000,
    ]);
  });

  it('is sent once where two processes look at the same outbox', async () => {
    const app = openTestApp();
    let sent = 0;
    const transport: MailTransport = {
      async send() {
        sent += 1;
        await new Promise((resolve) => setTimeout(resolve, 20));
      },
      close() {},
    };
    for (let count = 0; count < 5; count += 1)
      app.services.mail.send(`p${count}@larkmoor.example`, confirmAddressMail('P', link));
    deliver(app, transport);
    deliver(app, transport);
    await vi.waitFor(() => expect(rows(app).every((row) => row.state === 'sent')).toBe(true));
    expect(sent).toBe(5);
  });

  it('has what people call themselves escaped, on one line, and in no head', async () => {
    const mail = invitationMail({
      library: hostile,
      role: 'reviewer',
      invitedBy: hostile,
      address: link,
      days: 7,
    });
    expect(mail.html).not.toMatch(/<b>/);
    expect(mail.html).toContain('Mallory &lt;b&gt; Bcc: all@larkmoor.example');
    expect(mail.subject).toBe('You are invited to Mallory <b> Bcc: all@larkmoor.example');
    expect(mail.text.split('\n').some((line) => line.startsWith('Bcc:'))).toBe(false);
    const app = openTestApp();
    catcher = await startMailCatcher();
    deliver(app, smtpTransport(catcher.smtpAddress, 'tally@larkmoor.example'));
    app.services.mail.send('ilse@larkmoor.example', mail);
    await vi.waitFor(() => expect(catcher?.mails()).toHaveLength(1), { timeout: 5000 });
    expect(catcher.mails()[0]?.to).toEqual(['ilse@larkmoor.example']);
    expect(await (await fetch(catcher.pageAddress)).text()).not.toMatch(/<b>/);
  });
});
