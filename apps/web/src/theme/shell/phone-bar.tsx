import { CloseButton, Drawer, Menu } from '@mantine/core';
import { useState } from 'react';
import { Hump } from './hump.js';
import classes from './shell.module.css';
import type { ShellItem, ShellLink, ShellPerson } from './shell-types.js';

const PLACES_IN_BAR = 3;

interface PhoneBarProps {
  readonly items: readonly ShellItem[];
  readonly current: ShellItem | null;
  readonly link: ShellLink;
  readonly person: ShellPerson | undefined;
  readonly personMenu: React.ReactNode;
}

/** Foot bar of the phone: three pages under the thumb, the others behind `More`. */
export function PhoneBar({ items, current, link: Link, person, personMenu }: PhoneBarProps) {
  const [isOpen, setOpen] = useState(false);
  if (items.length === 0) return null;
  const near = items.slice(0, PLACES_IN_BAR);
  const far = items.slice(PLACES_IN_BAR);
  const isFar = current !== null && far.includes(current);
  const waiting = far.reduce((sum, item) => sum + (item.count ?? 0), 0);
  return (
    <nav className={classes.phoneBar} aria-label="Pages, phone">
      {near.map((item) => (
        <Link
          key={item.to}
          to={item.to}
          className={classes.phoneItem}
          aria-current={item === current ? 'page' : undefined}
        >
          {item === current && <Hump className={classes.phoneHump} />}
          {item.label}
          {item.note ? <span className={classes.phoneNote}>{item.note}</span> : <Count item={item} />}
        </Link>
      ))}
      <button
        type="button"
        className={classes.phoneItem}
        data-current={isFar || undefined}
        aria-expanded={isOpen}
        onClick={() => setOpen(true)}
      >
        {isFar && <Hump className={classes.phoneHump} />}
        More
        {waiting > 0 && <span className={classes.phoneNote}>{waiting} waiting</span>}
      </button>
      <Drawer.Root
        opened={isOpen}
        onClose={() => setOpen(false)}
        position="bottom"
        size="auto"
        classNames={{ content: classes.sheet ?? '' }}
      >
        <Drawer.Overlay />
        <Drawer.Content aria-label="More pages">
          <Drawer.Body>
            <div className={classes.sheetHead}>
              <h2>{person ? person.organisationName : 'More'}</h2>
              <CloseButton aria-label="Close" size="xl" onClick={() => setOpen(false)} />
            </div>
            <div className={classes.sheetItems}>
              {far.map((item) => (
                <Link
                  key={item.to}
                  to={item.to}
                  className={classes.sheetItem}
                  aria-current={item === current ? 'page' : undefined}
                  onClick={() => setOpen(false)}
                >
                  {item.label}
                  <Count item={item} />
                </Link>
              ))}
            </div>
            {person && personMenu && <PersonMenu person={person} menu={personMenu} />}
          </Drawer.Body>
        </Drawer.Content>
      </Drawer.Root>
    </nav>
  );
}

/** The person's own menu, which stands in the head line on wider screens. */
function PersonMenu({ person, menu }: { readonly person: ShellPerson; readonly menu: React.ReactNode }) {
  return (
    <Menu position="top-start" width={280}>
      <Menu.Target>
        <button type="button" className={classes.sheetItem}>
          <span>
            {person.name}, {person.roleText}
          </span>
          <span className={classes.initials} aria-hidden="true">
            {person.initials}
          </span>
        </button>
      </Menu.Target>
      <Menu.Dropdown>{menu}</Menu.Dropdown>
    </Menu>
  );
}

function Count({ item }: { readonly item: ShellItem }) {
  if (!item.count) return null;
  return (
    <span className={classes.phoneNote}>
      <span aria-hidden="true">{item.count}</span>
      <span className="sk-hidden">{item.countLabel ?? `${item.count} waiting`}</span>
    </span>
  );
}
