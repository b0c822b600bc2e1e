/** A mail server of the test's own: takes everything, or refuses as told. */
import type { AddressInfo } from 'node:net';
import { type ParsedMail, simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export interface Mail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly messageId: string;
  readonly attachments: readonly { fileName: string; contentType: string; content: Buffer }[];
}

export interface MailBox {
  readonly url: string;
  readonly received: readonly Mail[];
  /** Mails to one address, oldest first. */
  to(address: string): readonly Mail[];
  /** The token in the newest mail with a link for this address. */
  tokenFor(address: string): string;
  /** From now on every mail is refused with this SMTP reply code; null takes them again. */
  refuseWith(code: number | null): void;
  stop(): Promise<void>;
}

export async function startMailBox(): Promise<MailBox> {
  const received: Mail[] = [];
  let refusal: number | null = null;
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData: (stream, _session, done) => {
      simpleParser(stream).then((parsed) => {
        if (refusal !== null) return done(Object.assign(new Error('refused by the test'), { responseCode: refusal }));
        received.push(mailOf(parsed));
        return done();
      }, done);
    },
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const to = (address: string) => received.filter((mail) => mail.to === address);
  return {
    url: `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`,
    received,
    to,
    tokenFor: (address) => {
      const tokens = to(address).map((mail) => /[?&]token=([\w-]+)/.exec(mail.text)?.[1]);
      const token = tokens.filter((each) => each !== undefined).at(-1);
      if (token === undefined) throw new Error(`No mail with a link has come to ${address}.`);
      return token;
    },
    refuseWith: (code) => {
      refusal = code;
    },
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

function mailOf(parsed: ParsedMail): Mail {
  const to = Array.isArray(parsed.to) ? parsed.to[0] : parsed.to;
  return {
    to: to?.value[0]?.address ?? '',
    subject: parsed.subject ?? '',
    text: parsed.text ?? '',
    html: parsed.html || '',
    messageId: parsed.messageId ?? '',
    attachments: parsed.attachments.map(({ filename = '', contentType, content }) => ({
      fileName: filename,
      contentType,
      content,
    })),
  };
}
