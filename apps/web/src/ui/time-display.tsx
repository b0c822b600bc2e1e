import { createContext, type ReactNode, useContext } from 'react';

/** How a person likes times: in UTC, or on the clocks of one place. The other one is always shown on hover. */
export interface TimeDisplay {
  readonly mode: 'utc' | 'local';
  /** IANA name of the person's own time zone. */
  readonly timeZone: string;
}

const TimeDisplayContext = createContext<TimeDisplay>({ mode: 'utc', timeZone: 'UTC' });

/** Sets how every `DayTime` below is written. */
export function TimeDisplayProvider({
  value,
  children,
}: {
  readonly value: TimeDisplay;
  readonly children: ReactNode;
}) {
  return <TimeDisplayContext.Provider value={value}>{children}</TimeDisplayContext.Provider>;
}

/** How this person likes times. */
export function useTimeDisplay(): TimeDisplay {
  return useContext(TimeDisplayContext);
}
