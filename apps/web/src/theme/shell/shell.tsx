/** The frame of every page: head line, clock, who is looking, and the phone's bar. Knows no role and fetches nothing. */
import { Menu } from '@mantine/core';
import { Mark } from '../mark.js';
import { currentItem } from './current-item.js';
import { HeadNav } from './head-nav.js';
import { PhoneBar } from './phone-bar.js';
import classes from './shell.module.css';
import type { ShellLink, ShellPerson, ShellProps } from './shell-types.js';
import { useInkForPrint } from './use-ink-for-print.js';
import { UtcClock } from './utc-clock.js';

const PlainLink: ShellLink = ({ to, ...rest }) => <a href={to} {...rest} />;

/** Head line, page and tray. The head's lower line is a horizon, on which the open page is a hump. */
export function Shell(props: ShellProps) {
  const { items, link: Link = PlainLink, person, clock, tray, homeTo = '/' } = props;
  useInkForPrint();
  const current = currentItem(items, props.currentPath);
  return (
    <div className={classes.shell} data-tray={tray ? true : undefined}>
      <a className={classes.skip} href="#page">
        Skip to the page
      </a>
      <header className={classes.head}>
        <Link to={homeTo} className={classes.brand} aria-label="Skyberth, home">
          <Mark />
          <span className={classes.wideOnly}>Skyberth</span>
          <span className={classes.phoneOnly}>{props.phoneTitle ?? current?.label ?? 'Skyberth'}</span>
        </Link>
        <HeadNav items={items} current={current} link={Link} />
        <div className={classes.right}>
          {props.tools && <div className={classes.tools}>{props.tools}</div>}
          <UtcClock clock={clock} />
          {person ? <PersonBlock person={person} menu={props.personMenu} /> : props.guest}
        </div>
      </header>
      {props.banner}
      <main id="page" className={classes.page} tabIndex={-1}>
        {props.children}
      </main>
      {tray && <div className={classes.tray}>{tray}</div>}
      <PhoneBar items={items} current={current} link={Link} personMenu={props.personMenu} person={person} />
    </div>
  );
}

function PersonBlock({ person, menu }: { person: ShellPerson; menu: React.ReactNode }) {
  return (
    <Menu position="bottom-end" width={250} offset={10}>
      <Menu.Target>
        <button type="button" className={classes.person} aria-label={`${person.name}, ${person.organisationName}`}>
          <span className={classes.personText}>
            <span className={classes.organisation}>{person.organisationName}</span>
            <span className={classes.personName}>
              {person.name}, {person.roleText}
            </span>
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
