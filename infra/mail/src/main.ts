import { start } from './index.js';

function portFrom(name: string, fallback: number): number {
  const value = Number(process.env[name] ?? fallback);
  if (!Number.isInteger(value) || value < 0 || value > 65_535)
    throw new Error(`${name} must be a port number, not "${process.env[name]}"`);
  return value;
}

const service = await start({
  port: portFrom('MAIL_PORT', 8025),
  smtpPort: portFrom('SMTP_PORT', 2525),
  dataDir: process.env.MAIL_DATA_DIR ?? 'var/mail',
});
console.log(`Local mail (sent to nobody) at ${service.url}, SMTP on port ${service.smtpPort}`);

let stopping = false;
for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    if (stopping) return;
    stopping = true;
    service.close().then(
      () => process.exit(0),
      (error: unknown) => {
        console.error(error);
        process.exit(1);
      },
    );
  });
}
