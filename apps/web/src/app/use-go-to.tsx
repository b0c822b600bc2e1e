/** The button and the keys that open `Go to`; its code is fetched at the first use. */
import { useHotkeys } from '@mantine/hooks';
import { lazy, type ReactNode, Suspense, useState } from 'react';
import classes from './go-to.module.css';

const open = async () => (await import('./go-to-store.js')).goTo.open();
const GoTo = lazy(async () => ({ default: (await import('./go-to.js')).GoTo }));

/** What stands in the head line, what must be mounted once, and how else to open it. */
export function useGoTo(): { readonly button: ReactNode; readonly dialog: ReactNode; readonly open: () => void } {
  const [isWanted, setWanted] = useState(false);
  const show = () => {
    setWanted(true);
    void open();
  };
  useHotkeys([['mod+K', show]], []);
  return {
    button: (
      <button type="button" className={classes.button} onClick={show} aria-keyshortcuts="Control+K Meta+K">
        Go to <kbd>Ctrl K</kbd>
      </button>
    ),
    dialog: isWanted && (
      <Suspense fallback={null}>
        <GoTo />
      </Suspense>
    ),
    open: show,
  };
}
