import { useEffect } from 'react';

const SCHEME = 'data-mantine-color-scheme';

/** Prints in the light scheme whatever the screen shows: night watch would waste ink and grey the figures. */
export function useInkForPrint(): void {
  useEffect(() => {
    const root = document.documentElement;
    let screenScheme: string | null = null;
    const before = () => {
      screenScheme = root.getAttribute(SCHEME);
      root.setAttribute(SCHEME, 'light');
    };
    const after = () => {
      if (screenScheme) root.setAttribute(SCHEME, screenScheme);
    };
    window.addEventListener('beforeprint', before);
    window.addEventListener('afterprint', after);
    return () => {
      window.removeEventListener('beforeprint', before);
      window.removeEventListener('afterprint', after);
    };
  }, []);
}
