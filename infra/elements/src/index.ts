import { once } from 'node:events';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { Feed } from './feed.js';
import { FeedSite } from './web.js';

export interface ElementsSettings {
  /** Port on 127.0.0.1; 0 asks the system for a free one. */
  port: number;
  /** Folder that holds `elements.json`, unless `file` names another. */
  dataDir: string;
  file?: string;
}

export interface RunningElements {
  url: string;
  close(): Promise<void>;
}

/** Starts the element feed on 127.0.0.1. The file may come later; until then /health says that it is missing. */
export async function start(settings: ElementsSettings): Promise<RunningElements> {
  const site = new FeedSite(new Feed(settings.file ?? join(settings.dataDir, 'elements.json')));
  const server = createServer(site.app);
  server.listen(settings.port, '127.0.0.1');
  await once(server, 'listening');
  return {
    url: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    close: async () => {
      const closed = once(server, 'close');
      server.close();
      server.closeAllConnections();
      await closed;
    },
  };
}
