import { once } from 'node:events';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { MessageStore } from './message-store.js';
import { buildSmtpServer } from './smtp.js';
import { buildWeb } from './web.js';

export type { AttachmentInfo, Message, MessageSummary } from './message-store.js';

export interface MailSettings {
  /** Port of the pages and the JSON API; 0 asks the system for a free one. */
  port: number;
  smtpPort: number;
  dataDir: string;
  /** Largest message taken. */
  sizeMaxBytes?: number;
  /** How many messages are kept; the oldest go. */
  messagesMax?: number;
}

export interface RunningMail {
  url: string;
  smtpPort: number;
  close(): Promise<void>;
}

const SIZE_MAX_BYTES = 10 * 1024 * 1024;
const MESSAGES_MAX = 5000;

/** Starts the SMTP sink and its pages on 127.0.0.1. */
export async function start(settings: MailSettings): Promise<RunningMail> {
  const store = new MessageStore(settings.dataDir, settings.messagesMax ?? MESSAGES_MAX);
  const smtp = buildSmtpServer(store, settings.sizeMaxBytes ?? SIZE_MAX_BYTES);
  const web = createServer(buildWeb(store));
  smtp.server.listen(settings.smtpPort, '127.0.0.1');
  await once(smtp.server, 'listening');
  web.listen(settings.port, '127.0.0.1');
  await once(web, 'listening');
  return {
    url: `http://127.0.0.1:${(web.address() as AddressInfo).port}`,
    smtpPort: (smtp.server.address() as AddressInfo).port,
    close: async () => {
      await Promise.all([closeWeb(web), new Promise<void>((resolve) => smtp.close(resolve))]);
    },
  };
}

async function closeWeb(web: Server): Promise<void> {
  const closed = once(web, 'close');
  web.close();
  web.closeAllConnections();
  await closed;
}
