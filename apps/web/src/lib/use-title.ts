import { useEffect } from 'react';

/** Sets the window's title while the page is open. */
export function useTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Skyberth`;
  }, [title]);
}
