/** Nothing that was typed is lost by a click elsewhere: the page asks first. */
import { modals } from '@mantine/modals';
import { useEffect, useRef } from 'react';
import { useBlocker } from 'react-router-dom';

/**
 * While `isDirty`, leaving the page asks, whether by a link, by going back or by closing the window. `what` completes
 * "Leave without saving ...?". Moving between the tabs of the same address is not leaving unless `alsoSearch`.
 */
export function useLeaveGuard(isDirty: boolean, what: string, alsoSearch = false): void {
  const blocker = useBlocker(
    ({ currentLocation, nextLocation }) =>
      isDirty &&
      (currentLocation.pathname !== nextLocation.pathname ||
        (alsoSearch && currentLocation.search !== nextLocation.search)),
  );
  useEffect(() => {
    if (!isDirty) return;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [isDirty]);
  // The dialog outlives renders, so it answers for the blocker of the moment, and is opened once.
  const latest = useRef(blocker);
  const isAsking = useRef(false);
  useEffect(() => {
    latest.current = blocker;
    if (blocker.state !== 'blocked' || isAsking.current) return;
    isAsking.current = true;
    let isLeaving = false;
    modals.openConfirmModal({
      title: `Leave without saving ${what}?`,
      children: 'What you changed here is lost when you leave.',
      labels: { confirm: 'Leave', cancel: 'Stay here' },
      confirmProps: { color: 'buoy', variant: 'outline' },
      onConfirm: () => {
        isLeaving = true;
        isAsking.current = false;
        latest.current.proceed?.();
      },
      // The dialog also closes after its answer, by Escape and by its cross.
      onClose: () => {
        isAsking.current = false;
        if (!isLeaving) latest.current.reset?.();
      },
    });
  }, [blocker, what]);
}
