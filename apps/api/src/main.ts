/** The server process. */
import { createApp } from './app.js';
import { readConfig } from './platform/config.js';

const config = readConfig(process.env);
const app = await createApp(config);
await app.listen(config.port, config.host);
