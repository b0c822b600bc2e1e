/** One of several processes that issue invoices at once: `node issue-invoices.mjs <database> <part> <parts>`. */
import { AuditService, InvoiceRepository, InvoiceService, readConfig, systemClock, write } from '@skyberth/api';
import { bookings, openDatabase } from '@skyberth/drizzle';

const [file, part, parts] = process.argv.slice(2);
const config = readConfig({
  SKYBERTH_TOKEN_SECRET: 'a secret for tests only, thirty-two characters',
  PAYMENTS_URL: 'http://127.0.0.1:9',
  STRIPE_SECRET_KEY: 'sk_test_harness',
  STRIPE_WEBHOOK_SECRET: 'whsec_harness',
  SMTP_URL: 'smtp://127.0.0.1:9',
});
const db = openDatabase(file);
const audit = new AuditService(systemClock);
const none = undefined;
const invoices = new InvoiceService(new InvoiceRepository(db), none, none, audit, systemClock, config);
const mine = db
  .select()
  .from(bookings)
  .all()
  .filter((_, index) => index % Number(parts) === Number(part));
for (const booking of mine) write(db, (tx) => invoices.issue(tx, booking, `Contact ${booking.number}`));
db.$client.close();
