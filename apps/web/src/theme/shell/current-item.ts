import type { ShellItem } from './shell-types.js';

/** The item whose path begins the open one by whole segments; the longest wins. Null when none does. */
export function currentItem(items: readonly ShellItem[], path: string): ShellItem | null {
  const clean = trim(path);
  let best: ShellItem | null = null;
  for (const item of items) {
    const to = trim(item.to);
    const fits = clean === to || (to !== '' && clean.startsWith(`${to}/`));
    if (fits && (!best || to.length > trim(best.to).length)) best = item;
  }
  return best;
}

function trim(path: string): string {
  return (path.split(/[?#]/)[0] ?? '').replace(/\/+$/, '');
}
