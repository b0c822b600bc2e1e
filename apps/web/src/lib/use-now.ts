import { useEffect, useState } from 'react';
import { serverNowMs } from './server-clock.js';

/** The marketplace's clock in UTC milliseconds, read again every `stepMs` (a second by default). */
export function useNow(stepMs = 1_000): number {
  const [nowMs, setNowMs] = useState(serverNowMs);
  useEffect(() => {
    const timer = window.setInterval(() => setNowMs(serverNowMs()), stepMs);
    return () => window.clearInterval(timer);
  }, [stepMs]);
  return nowMs;
}
