/** Pages in the head line: as many as fit, the others behind `More`, never a scroll nobody sees. */
import { Menu } from '@mantine/core';
import { useLayoutEffect, useRef, useState } from 'react';
import { howManyFit } from './how-many-fit.js';
import { Hump } from './hump.js';
import classes from './shell.module.css';
import type { ShellItem, ShellLink } from './shell-types.js';

interface HeadNavProps {
  readonly items: readonly ShellItem[];
  readonly current: ShellItem | null;
  readonly link: ShellLink;
}

export function HeadNav({ items, current, link: Link }: HeadNavProps) {
  const nav = useRef<HTMLElement>(null);
  const fitting = useFitting(nav, items);
  const near = items.slice(0, fitting);
  const far = items.slice(fitting);
  const isFar = current !== null && far.includes(current);
  const waiting = far.reduce((sum, item) => sum + (item.count ?? 0), 0);
  return (
    <nav ref={nav} className={classes.nav} aria-label="Pages">
      {near.map((item) => (
        <Link
          key={item.to}
          to={item.to}
          className={classes.navItem}
          aria-current={item === current ? 'page' : undefined}
        >
          <NavWords item={item} />
          {item === current && <Hump className={classes.hump} />}
        </Link>
      ))}
      {far.length > 0 && (
        <Menu position="bottom-end" offset={0}>
          <Menu.Target>
            <button type="button" className={classes.navItem} data-current={isFar || undefined}>
              {isFar ? current.label : 'More'}
              <span aria-hidden="true">▾</span>
              {isFar && <span className="sk-hidden">, more pages</span>}
              {waiting > 0 && <Count count={waiting} label={`${waiting} waiting there`} />}
              {isFar && <Hump className={classes.hump} />}
            </button>
          </Menu.Target>
          <Menu.Dropdown>
            {far.map((item) => (
              <Menu.Item
                key={item.to}
                renderRoot={(rest) => (
                  <Link to={item.to} aria-current={item === current ? 'page' : undefined} {...rest} />
                )}
              >
                <NavWords item={item} />
              </Menu.Item>
            ))}
          </Menu.Dropdown>
        </Menu>
      )}
      <div className={classes.navRuler} aria-hidden="true">
        {items.map((item) => (
          <span key={item.to} className={classes.navItem} data-current="true">
            {item.label}
            {item.count !== undefined && item.count > 0 && <span className={classes.count}>{item.count}</span>}
          </span>
        ))}
      </div>
    </nav>
  );
}

function NavWords({ item }: { readonly item: ShellItem }) {
  return (
    <>
      {item.label}
      {item.count !== undefined && item.count > 0 && (
        <Count count={item.count} label={item.countLabel ?? `${item.count} waiting`} />
      )}
    </>
  );
}

function Count({ count, label }: { readonly count: number; readonly label: string }) {
  return (
    <span className={classes.count}>
      <span aria-hidden="true">{count}</span>
      <span className="sk-hidden">{label}</span>
    </span>
  );
}

/** How many items fit, measured on an unseen copy of all of them, again whenever the room changes. */
function useFitting(nav: React.RefObject<HTMLElement | null>, items: readonly ShellItem[]): number {
  const [fitting, setFitting] = useState(items.length);
  // biome-ignore lint/correctness/useExhaustiveDependencies: other words or counts have other widths.
  useLayoutEffect(() => {
    const element = nav.current;
    const ruler = element?.querySelector(`.${classes.navRuler}`);
    if (!element || !ruler) return;
    const measure = () => {
      const widths = [...ruler.children].map((child) => child.getBoundingClientRect().width);
      const gapPx = Number.parseFloat(getComputedStyle(element).columnGap) || 0;
      setFitting(howManyFit(widths, gapPx, element.clientWidth));
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    observer.observe(ruler);
    return () => observer.disconnect();
  }, [items.map((item) => `${item.label}${item.count ?? ''}`).join()]);
  return fitting;
}
