import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readMail } from '../../../server/stand-ins/mail-catcher/read-mail.ts';
import { type Envelope, SmtpConversation } from '../../../server/stand-ins/mail-catcher/smtp-lines.ts';

function talk(pieces: readonly string[]) {
  const kept: { envelope: Envelope; data: string }[] = [];
  const conversation = new SmtpConversation((envelope, data) =>
    kept.push({ envelope, data: data.toString() }),
  );
  const replies = pieces.flatMap((piece) => conversation.take(Buffer.from(piece)).map((reply) => reply.text));
  return { kept, codes: replies.map((text) => text.slice(0, 3)) };
}

const whole =
  'EHLO x\r\nMAIL FROM:<a@x.example> SIZE=9\r\nRCPT TO:<b@x.example>\r\nDATA\r\nSubject: s\r\n\r\n..dot\r\n.\r\nQUIT\r\n';

describe('SMTP conversation', () => {
  it('keeps the same mail however the lines are cut on their way', () => {
    const expected = talk([whole]);
    expect(expected.codes).toEqual(['250', '250', '250', '354', '250', '221']);
    expect(expected.kept).toEqual([
      { envelope: { from: 'a@x.example', to: ['b@x.example'] }, data: 'Subject: s\r\n\r\n.dot\r\n' },
    ]);
    fc.assert(
      fc.property(fc.array(fc.nat(whole.length), { maxLength: 12 }), (cuts) => {
        const at = [0, ...cuts.toSorted((a, b) => a - b), whole.length];
        const pieces = at.slice(1).map((end, index) => whole.slice(at[index], end));
        expect(talk(pieces)).toEqual(expected);
      }),
      { seed: 7, numRuns: 100 },
    );
  });

  it('takes no mail without sender and recipient, and no line without end', () => {
    expect(talk(['DATA\r\nRCPT TO:<b@x.example>\r\nMAIL FROM:nobody\r\nVRFY b\r\n']).codes).toEqual([
      '503',
      '503',
      '501',
      '502',
    ]);
    expect(talk(['x'.repeat(5000)]).codes).toEqual(['500']);
  });
});

describe('reading a mail', () => {
  it('decodes headers and the first plain part, in base64 and quoted-printable', () => {
    const plain =
      'Content-Type: text/plain; charset=utf-8\r\nContent-Transfer-Encoding: quoted-printable\r\n\r\nf=C3=BCr =\r\nalle\r\n';
    const source = `Subject: =?UTF-8?B?${Buffer.from('für').toString('base64')}?= =?UTF-8?Q?_alle?=\r\nContent-Type: multipart/alternative;\r\n boundary="b"\r\n\r\n--b\r\n${plain}--b\r\nContent-Type: text/html\r\n\r\n<p>\r\n--b--\r\n`;
    expect(readMail(Buffer.from(source))).toEqual({ subject: 'für alle', text: 'für alle\r\n' });
    const encoded = `Subject: s\r\nContent-Transfer-Encoding: base64\r\n\r\n${Buffer.from('für').toString('base64')}\r\n`;
    expect(readMail(Buffer.from(encoded)).text).toBe('für');
  });
});
