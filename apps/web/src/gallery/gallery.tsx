/** A page for looking at the drawings while changing them. Served in development only; nothing links to it. */
import '@mantine/core/styles.css';
import '@fontsource-variable/manrope/index.css';
import '../theme/global.css';
import { MantineProvider, Menu } from '@mantine/core';
import { type ComponentType, lazy, Suspense } from 'react';
import { createRoot } from 'react-dom/client';
import { Shell } from '../theme/shell/shell.js';
import { cssVariablesResolver, theme } from '../theme/theme.js';
import { NOW } from './invented.js';

const PLATES: Readonly<Record<string, () => Promise<{ default: ComponentType }>>> = {
  board: () => import('./plate-board.js'),
  states: () => import('./plate-states.js'),
  crowd: () => import('./plate-crowd.js'),
  sky: () => import('./plate-sky.js'),
  mask: () => import('./plate-mask.js'),
  curves: () => import('./plate-curves.js'),
  map: () => import('./plate-map.js'),
  parts: () => import('./plate-parts.js'),
};

const query = new URLSearchParams(location.search);
const name = query.get('plate') ?? 'board';
const Plate = lazy(PLATES[name] ?? (PLATES['board'] as () => Promise<{ default: ComponentType }>));
const items = [
  { label: 'Find time', to: '/board' },
  { label: 'Plan', to: '/states' },
  { label: 'Bookings', to: '/curves', note: 'held 7:42' },
  { label: 'Spacecraft', to: '/sky' },
  { label: 'Clearances', to: '/mask', count: 3, countLabel: '3 clearances wait' },
  { label: 'Standby', to: '/crowd' },
  { label: 'Invoices', to: '/parts' },
];

createRoot(document.getElementById('root') as HTMLElement).render(
  <MantineProvider
    theme={theme}
    cssVariablesResolver={cssVariablesResolver}
    defaultColorScheme={query.get('scheme') === 'dark' ? 'dark' : 'light'}
  >
    <Shell
      items={items}
      currentPath={`/${name}`}
      clock={() => NOW}
      person={{ name: 'Mirela Kovač', roleText: 'planner', organisationName: 'Saltmarsh Observation', initials: 'MK' }}
      personMenu={<Menu.Item>Profile and security</Menu.Item>}
    >
      <Suspense fallback={null}>
        <Plate />
      </Suspense>
    </Shell>
  </MantineProvider>,
);
