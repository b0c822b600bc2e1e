/** The spacecraft of an organisation: a table, and cards where a table would be too wide. */
import { Anchor, Paper, Table } from '@mantine/core';
import type { Spacecraft } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { formatDegrees, formatDuration } from '../../ui/format.js';
import { StateBadge } from '../../ui/state-badge.js';
import { identityWords, radioWords } from './craft-words.js';
import { heightWords, periodMs } from './element-words.js';
import { ElementAge } from './freshness.js';
import classes from './spacecraft.module.css';

interface ListProps {
  readonly items: readonly Spacecraft[];
  readonly mayWrite: boolean;
}

export function SpacecraftTable({ items, mayWrite }: ListProps) {
  return (
    <div className={classes.scroll}>
      <Table highlightOnHover={false}>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Spacecraft</Table.Th>
            <Table.Th>Elements</Table.Th>
            <Table.Th>Orbit</Table.Th>
            <Table.Th>Radios</Table.Th>
            <Table.Th>Next</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {items.map((craft) => (
            <Table.Tr key={craft.id}>
              <Table.Td>
                <NameCell craft={craft} />
              </Table.Td>
              <Table.Td>
                <ElementAge freshness={craft.freshness} elements={craft.elements} />
              </Table.Td>
              <Table.Td>
                <OrbitCell craft={craft} />
              </Table.Td>
              <Table.Td>
                <RadiosCell craft={craft} mayWrite={mayWrite} />
              </Table.Td>
              <Table.Td>
                <NextActs craft={craft} mayWrite={mayWrite} />
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}

export function SpacecraftCards({ items, mayWrite }: ListProps) {
  return (
    <ul className={classes.cards}>
      {items.map((craft) => (
        <Paper component="li" withBorder key={craft.id} className={classes.card}>
          <NameCell craft={craft} />
          <ElementAge freshness={craft.freshness} elements={craft.elements} />
          <div className={classes.cardPair}>
            <OrbitCell craft={craft} />
            <RadiosCell craft={craft} mayWrite={mayWrite} />
          </div>
          <NextActs craft={craft} mayWrite={mayWrite} />
        </Paper>
      ))}
    </ul>
  );
}

function NameCell({ craft }: { readonly craft: Spacecraft }) {
  return (
    <div>
      <div className={classes.nameLine}>
        <Anchor component={Link} to={paths.oneSpacecraft(craft.id)} className={classes.name}>
          {craft.name}
        </Anchor>
        {craft.state === 'retired' && <StateBadge tone="quiet">Out of use</StateBadge>}
      </div>
      <div className={classes.quiet}>{identityWords(craft)}</div>
    </div>
  );
}

function OrbitCell({ craft: { elements } }: { readonly craft: Spacecraft }) {
  if (!elements) return <span className={classes.quiet}>unknown</span>;
  return (
    <div>
      <div>{heightWords(elements)}&nbsp;km</div>
      <div className={classes.quiet}>
        {formatDegrees(elements.inclinationDeg)}, {formatDuration(periodMs(elements.meanMotionRevPerDay))}
      </div>
    </div>
  );
}

function RadiosCell({ craft, mayWrite }: { readonly craft: Spacecraft; readonly mayWrite: boolean }) {
  if (craft.radios.length > 0) return <span>{radioWords(craft.radios)}</span>;
  if (!mayWrite || craft.state === 'retired') return <span className={classes.quiet}>none</span>;
  return (
    <Anchor component={Link} to={`${paths.editSpacecraft(craft.id)}#radios`}>
      Add a radio
    </Anchor>
  );
}

function NextActs({ craft, mayWrite }: { readonly craft: Spacecraft; readonly mayWrite: boolean }) {
  if (craft.state === 'retired') return null;
  return (
    <div className={classes.links}>
      {craft.elements && craft.radios.length > 0 && (
        <Anchor component={Link} to={`${paths.findTime}?craft=${craft.id}`} aria-label={`Find time for ${craft.name}`}>
          Find time
        </Anchor>
      )}
      {mayWrite && (
        <Anchor
          component={Link}
          to={`${paths.addElements}?craft=${craft.id}`}
          aria-label={`New elements for ${craft.name}`}
        >
          New elements
        </Anchor>
      )}
    </div>
  );
}
