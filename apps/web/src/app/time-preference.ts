import { useLocalStorage } from '@mantine/hooks';
import type { TimeDisplay } from '../ui/time-display.js';

/** Whether this person reads UTC or the clock on their wall; kept in the browser. */
export function useTimePreference(): [TimeDisplay, () => void] {
  const [mode, setMode] = useLocalStorage<TimeDisplay['mode']>({ key: 'skyberth-time', defaultValue: 'utc' });
  const timeZone = Intl.DateTimeFormat().resolvedOptions().timeZone;
  return [{ mode, timeZone }, () => setMode(mode === 'utc' ? 'local' : 'utc')];
}
