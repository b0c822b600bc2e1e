/** The antennas of a station: what each is, whether it is sold, and what it still needs. */
import { Anchor, Table } from '@mantine/core';
import type { Station } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { formatNumber } from '../../ui/format.js';
import { AntennaBadge } from '../../ui/station-badges.js';
import classes from './stations.module.css';

interface AntennaTableProps {
  readonly station: Station;
  readonly mayWrite: boolean;
}

export function AntennaTable({ station, mayWrite }: AntennaTableProps) {
  if (station.antennas.length === 0)
    return mayWrite ? (
      <Anchor component={Link} to={paths.newAntenna(station.id)}>
        Add an antenna to {station.name}
      </Anchor>
    ) : (
      <p className={classes.quiet}>It has no antenna yet.</p>
    );
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Antenna</Table.Th>
            <Table.Th ta="right">Diameter, m</Table.Th>
            <Table.Th>Bands</Table.Th>
            <Table.Th>State</Table.Th>
            <Table.Th>Still needed</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {station.antennas.map((antenna) => (
            <Table.Tr key={antenna.id}>
              <Table.Td>
                <Anchor component={Link} to={paths.antenna(antenna.id)} fw={700}>
                  {antenna.name}
                </Anchor>
              </Table.Td>
              <Table.Td ta="right">{formatNumber(antenna.diameterM, 1)}</Table.Td>
              <Table.Td>{antenna.bands.join(', ') || <span className={classes.quiet}>none</span>}</Table.Td>
              <Table.Td>
                <AntennaBadge state={antenna.state} />
              </Table.Td>
              <Table.Td className={classes.missing}>
                {antenna.missing.length === 0 ? (
                  <span className={classes.quiet}>nothing</span>
                ) : (
                  antenna.missing.join(' ')
                )}
              </Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}
