import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import type { MessageStore } from './message-store.js';

const RECIPIENTS_MAX = 50;

/** An SMTP server that takes everything within its bounds and passes nothing on. */
export function buildSmtpServer(store: MessageStore, sizeMaxBytes: number): SMTPServer {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    disableReverseLookup: true,
    size: sizeMaxBytes,
    maxClients: 20,
    socketTimeout: 30_000,
    onRcptTo: (_address, session, callback) => {
      callback(
        session.envelope.rcptTo.length >= RECIPIENTS_MAX
          ? smtpError(452, `At most ${RECIPIENTS_MAX} recipients.`)
          : null,
      );
    },
    onData: (stream, session, callback) => {
      receive(store, stream, session, sizeMaxBytes).then(
        () => callback(null, 'Stored; it goes no further.'),
        (error: unknown) => callback(error instanceof Error ? error : new Error(String(error))),
      );
    },
  });
  // A client that hangs up in the middle is its own problem; without a listener it would end the process.
  server.on('error', (error: Error) => console.error('mail stand-in:', error.message));
  return server;
}

async function receive(
  store: MessageStore,
  stream: SMTPServerDataStream,
  session: SMTPServerSession,
  sizeMaxBytes: number,
): Promise<void> {
  const chunks: Buffer[] = [];
  let sizeBytes = 0;
  for await (const chunk of stream as AsyncIterable<Buffer>) {
    sizeBytes += chunk.length;
    // What is too large is read to its end, as the protocol wants, but not kept.
    if (sizeBytes <= sizeMaxBytes) chunks.push(chunk);
  }
  if (sizeBytes > sizeMaxBytes) throw smtpError(552, `The message is larger than ${sizeMaxBytes} bytes.`);
  const { mailFrom, rcptTo } = session.envelope;
  await store.add(
    { from: mailFrom ? mailFrom.address : '', to: rcptTo.map(({ address }) => address) },
    Buffer.concat(chunks),
  );
}

function smtpError(responseCode: number, message: string): Error {
  return Object.assign(new Error(message), { responseCode });
}
