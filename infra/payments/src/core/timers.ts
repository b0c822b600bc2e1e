import { expireSession } from '../objects/checkout-sessions.js';
import { cancelIntent } from '../objects/intent-life.js';
import { arrivePayout } from '../objects/payout-life.js';
import { failRefund, settlePendingRefunds } from '../objects/refund-life.js';
import { balanceOf } from './balance.js';
import type { Desk, Task } from './desk.js';
import { PLATFORM } from './store.js';

interface Timer {
  seq: number;
  task: Task;
  ref: string;
}

/** Does everything that time has made due, oldest first, each in its own transaction. Returns how many. */
export function runDueTimers(desk: Desk): number {
  let done = 0;
  for (;;) {
    const timer = desk.store
      .sql('SELECT seq, task, ref FROM timers WHERE due_ms <= ? ORDER BY due_ms, seq LIMIT 1')
      .get(desk.clock.nowMs()) as Timer | undefined;
    if (!timer) return done;
    desk.store.transaction(() => {
      desk.cause = { requestId: null, idempotencyKey: null };
      // Removed first: one run does the task, whether it finds something to do or not.
      desk.store.sql('DELETE FROM timers WHERE seq = ?').run(timer.seq);
      runTask(desk, timer);
    });
    done += 1;
  }
}

function runTask(desk: Desk, timer: Timer): void {
  const account = desk.store.accountOf(timer.ref) ?? PLATFORM;
  switch (timer.task) {
    case 'expire_authorisation': {
      const intent = desk.store.find('payment_intent', timer.ref, account);
      if (intent?.status === 'requires_capture') cancelIntent({ desk, account }, intent, 'automatic');
      return;
    }
    case 'expire_session': {
      const session = desk.store.find('checkout.session', timer.ref, account);
      if (session?.status === 'open') expireSession({ desk, account }, session);
      return;
    }
    case 'funds_available':
      fundsAvailable(desk, timer.ref);
      return;
    case 'payout_arrives':
      arrivePayout({ desk, account }, timer.ref);
      return;
    case 'refund_fails':
      failRefund({ desk, account }, timer.ref);
      return;
  }
}

/** Many charges settle in the same second; one event tells of all of them. */
function fundsAvailable(desk: Desk, account: string): void {
  desk.store
    .sql("DELETE FROM timers WHERE task = 'funds_available' AND ref = ? AND due_ms <= ?")
    .run(account, desk.clock.nowMs());
  desk.emit('balance.available', balanceOf(desk, account), account);
  settlePendingRefunds({ desk, account });
}
