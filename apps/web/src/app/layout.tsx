/** The frame around every signed-in page: head line, the person's menu, the tray of holds. */
import { Menu, useMantineColorScheme } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { useMutation, useQuery } from '@tanstack/react-query';
import { type ComponentProps, useEffect } from 'react';
import { Link, Outlet, useLocation, useNavigate } from 'react-router-dom';
import { call } from '../lib/api-client.js';
import { homeQuery } from '../lib/home-query.js';
import { paths } from '../lib/paths.js';
import { serverNowMs } from '../lib/server-clock.js';
import { useCan, useEnterSession, useSession } from '../lib/session.js';
import { Shell } from '../theme/shell/shell.js';
import type { ShellItem, ShellLink } from '../theme/shell/shell-types.js';
import { TimeDisplayProvider } from '../ui/time-display.js';
import { useHoldsTray } from './holds-tray.js';
import { pagesFor } from './navigation.js';
import { useTimePreference } from './time-preference.js';
import { useGoTo } from './use-go-to.js';

const RouterLink: ShellLink = ({ to, ...rest }) => (
  <Link to={to} {...(rest as Omit<ComponentProps<typeof Link>, 'to'>)} />
);

export function Layout() {
  const session = useSession();
  const location = useLocation();
  const { data: home } = useQuery(homeQuery);
  const [time, toggleTime] = useTimePreference();
  const tray = useHoldsTray();
  const goTo = useGoTo();
  useFocusOnNewPage(location.pathname);
  const items: ShellItem[] = pagesFor(session.active).map((page) => {
    const count = page.count ? home?.counts[page.count] : undefined;
    return {
      label: page.label,
      to: page.to,
      ...(count ? { count, countLabel: `${count} ${page.countNoun ?? 'wait'}` } : {}),
    };
  });
  return (
    <TimeDisplayProvider value={time}>
      <Shell
        items={items}
        currentPath={location.pathname}
        homeTo={paths.home}
        clock={serverNowMs}
        link={RouterLink}
        person={{
          name: session.person.name,
          roleText: session.active.role,
          organisationName: session.active.organisationName,
          initials: initialsOf(session.person.name),
        }}
        personMenu={<PersonMenu timeMode={time.mode} onToggleTime={toggleTime} onGoTo={goTo.open} />}
        tools={goTo.button}
        tray={tray}
      >
        <Outlet />
        {goTo.dialog}
      </Shell>
    </TimeDisplayProvider>
  );
}

const initialsOf = (name: string): string =>
  name
    .split(/\s+/)
    .map((word) => word[0] ?? '')
    .filter(Boolean)
    .slice(0, 2)
    .join('')
    .toUpperCase();

/** A new page begins at its heading, for a keyboard and for a reader of the screen. */
function useFocusOnNewPage(path: string): void {
  // biome-ignore lint/correctness/useExhaustiveDependencies: a new path is the reason to run, though its text is not read.
  useEffect(() => {
    const heading = document.querySelector<HTMLElement>('#page h1');
    if (document.activeElement === document.body) heading?.focus({ preventScroll: true });
    window.scrollTo(0, 0);
  }, [path]);
}

interface PersonMenuProps {
  readonly timeMode: 'utc' | 'local';
  readonly onToggleTime: () => void;
  readonly onGoTo: () => void;
}

function PersonMenu({ timeMode, onToggleTime, onGoTo }: PersonMenuProps) {
  const session = useSession();
  const navigate = useNavigate();
  const enter = useEnterSession();
  const can = useCan();
  const { colorScheme, setColorScheme } = useMantineColorScheme();
  const signOut = useMutation({
    mutationFn: () => call(routes.signOut, {}),
    onSettled: () => {
      enter(null);
      navigate(paths.signIn);
    },
  });
  const change = useMutation({
    mutationFn: (organisationId: string) => call(routes.switchOrganisation, { body: { organisationId } }),
    onSuccess: (next) => {
      enter(next);
      navigate(paths.home);
    },
  });
  const others = session.memberships.filter((one) => one.organisationId !== session.active.organisationId);
  const schemes = { auto: 'Colours as the device', light: 'Day colours', dark: 'Night watch' } as const;
  return (
    <>
      <Menu.Item component={Link} to={paths.security}>
        Security
      </Menu.Item>
      <Menu.Item component={Link} to={paths.organisation}>
        Organisation and members
      </Menu.Item>
      {can('api-keys.make') && (
        <Menu.Item component={Link} to={paths.keys}>
          API keys
        </Menu.Item>
      )}
      {others.length > 0 && <Menu.Label>Act for</Menu.Label>}
      {others.map((one) => (
        <Menu.Item key={one.organisationId} onClick={() => change.mutate(one.organisationId)}>
          {one.organisationName}
        </Menu.Item>
      ))}
      <Menu.Divider />
      <Menu.Item onClick={onGoTo}>Go to …</Menu.Item>
      <Menu.Item component={Link} to={paths.help}>
        Help
      </Menu.Item>
      <Menu.Item onClick={onToggleTime}>{timeMode === 'utc' ? 'Show local time' : 'Show UTC'}</Menu.Item>
      <Menu.Label>Colours</Menu.Label>
      {(['auto', 'light', 'dark'] as const).map((scheme) => (
        <Menu.Item
          key={scheme}
          role="menuitemradio"
          aria-checked={colorScheme === scheme}
          onClick={() => setColorScheme(scheme)}
          rightSection={colorScheme === scheme ? '✓' : null}
        >
          {schemes[scheme]}
        </Menu.Item>
      ))}
      <Menu.Divider />
      <Menu.Item onClick={() => signOut.mutate()}>Sign out</Menu.Item>
    </>
  );
}
