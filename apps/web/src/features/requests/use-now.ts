import { useEffect, useState } from 'react';
import { serverNowMs } from '../../lib/server-clock.js';

const TICK_MS = 1000;

/** The server's time, told anew each second. */
export function useNow(): number {
  const [nowMs, setNowMs] = useState(serverNowMs);
  useEffect(() => {
    const timer = window.setInterval(() => setNowMs(serverNowMs()), TICK_MS);
    return () => window.clearInterval(timer);
  }, []);
  return nowMs;
}
