/** What an SMTP client says, taken apart (RFC 5321): command lines, and after DATA a mail up to a lone dot. */

export interface Envelope {
  from: string;
  to: string[];
}

export interface SmtpReply {
  text: string;
  isLast?: boolean;
}

const most = { lineBytes: 4096, mailBytes: 10 * 1024 * 1024, recipients: 100 };
const address = /^(?:FROM|TO):\s*<([^<>\s]*)>/i;

/**
 * One client's conversation. `take` is given what has come over the wire, in whatever pieces, and returns
 * what to answer; `keep` is called with each mail that is complete.
 */
export class SmtpConversation {
  readonly greeting = '220 localhost mail catcher';
  readonly #keep: (envelope: Envelope, data: Buffer) => void;
  #rest = Buffer.alloc(0);
  #envelope: Envelope | null = null;
  #data: Buffer[] | null = null;
  #bytes = 0;

  constructor(keep: (envelope: Envelope, data: Buffer) => void) {
    this.#keep = keep;
  }

  take(piece: Buffer): SmtpReply[] {
    this.#rest = Buffer.concat([this.#rest, piece]);
    const replies: SmtpReply[] = [];
    for (let end = this.#rest.indexOf('\r\n'); end !== -1; end = this.#rest.indexOf('\r\n')) {
      const line = this.#rest.subarray(0, end);
      this.#rest = this.#rest.subarray(end + 2);
      const reply = this.#data ? this.#takeData(line) : this.#takeCommand(line.toString('utf8'));
      if (reply) replies.push(reply);
      if (reply?.isLast) return replies;
    }
    const isTooLong = this.#rest.length > (this.#data ? most.mailBytes : most.lineBytes);
    return isTooLong ? [...replies, { text: '500 line too long', isLast: true }] : replies;
  }

  #takeData(line: Buffer): SmtpReply | undefined {
    if (!this.#data) return undefined;
    if (!line.equals(Buffer.from('.'))) {
      this.#bytes += line.length + 2;
      // A dot was put before lines that begin with one.
      if (this.#bytes <= most.mailBytes)
        this.#data.push(line[0] === 0x2e ? line.subarray(1) : line, Buffer.from('\r\n'));
      return undefined;
    }
    const data = Buffer.concat(this.#data);
    const envelope = this.#envelope ?? { from: '', to: [] };
    const isTooLarge = this.#bytes > most.mailBytes;
    this.#reset();
    if (isTooLarge) return { text: '552 mail too large' };
    this.#keep(envelope, data);
    return { text: '250 caught' };
  }

  #reset(): void {
    this.#envelope = null;
    this.#data = null;
    this.#bytes = 0;
  }

  #takeCommand(line: string): SmtpReply {
    const [word = '', argument = ''] = [line.slice(0, 4).toUpperCase(), line.slice(4).trim()];
    switch (word) {
      case 'HELO':
        return { text: '250 localhost' };
      case 'EHLO':
        return { text: `250-localhost\r\n250-8BITMIME\r\n250-SMTPUTF8\r\n250 SIZE ${most.mailBytes}` };
      case 'MAIL': {
        const from = address.exec(argument)?.[1];
        if (from === undefined) return { text: '501 MAIL FROM:<address> was expected' };
        this.#envelope = { from, to: [] };
        return { text: '250 ok' };
      }
      case 'RCPT': {
        const to = address.exec(argument)?.[1];
        if (!this.#envelope) return { text: '503 MAIL comes first' };
        if (to === undefined || to === '') return { text: '501 RCPT TO:<address> was expected' };
        if (this.#envelope.to.length >= most.recipients) return { text: '452 too many recipients' };
        this.#envelope.to.push(to);
        return { text: '250 ok' };
      }
      case 'DATA':
        if (!this.#envelope?.to.length) return { text: '503 RCPT comes first' };
        this.#data = [];
        return { text: '354 end with a dot on a line of its own' };
      case 'RSET':
        this.#reset();
        return { text: '250 ok' };
      case 'NOOP':
        return { text: '250 ok' };
      case 'QUIT':
        return { text: '221 bye', isLast: true };
      default:
        return { text: '502 this is not spoken here' };
    }
  }
}
