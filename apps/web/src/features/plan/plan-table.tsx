/** Every contact of a plan, with a way to keep it in or to strike it out. */
import { Anchor, Checkbox, Table } from '@mantine/core';
import type { PlannedPass } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { DayTime } from '../../ui/day-time.js';
import { formatBytes, formatDegrees } from '../../ui/format.js';
import { Duration, MoneyText } from '../../ui/values.js';
import classes from './plan.module.css';

interface PlanTableProps {
  readonly passes: readonly PlannedPass[];
  readonly keptKeys: readonly string[];
  readonly struckKeys: readonly string[];
  readonly canEdit: boolean;
  readonly onKeep: (key: string) => void;
  readonly onStrike: (key: string) => void;
}

/** A station with one antenna often gives it its own name. */
const placeOf = ({ stationName, antennaName }: PlannedPass): string =>
  antennaName.startsWith(stationName) ? antennaName : `${stationName}, ${antennaName}`;

export function PlanTable({ passes, keptKeys, struckKeys, canEdit, onKeep, onStrike }: PlanTableProps) {
  return (
    <div className={classes.scroll}>
      <Table aria-label="Contacts of the plan">
        <Table.Thead>
          <Table.Tr>
            <Table.Th>AOS, UTC</Table.Th>
            <Table.Th>Spacecraft</Table.Th>
            <Table.Th>Antenna</Table.Th>
            <Table.Th ta="right">Length</Table.Th>
            <Table.Th ta="right">Highest</Table.Th>
            <Table.Th ta="right">Volume</Table.Th>
            <Table.Th ta="right">With VAT</Table.Th>
            {canEdit && <Table.Th>Keep in</Table.Th>}
            {canEdit && <Table.Th>Strike out</Table.Th>}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {passes.map((pass) => (
            <Table.Tr key={pass.key}>
              <Table.Td>
                <DayTime atMs={Date.parse(pass.aosUtc)} />
              </Table.Td>
              <Table.Td>{pass.spacecraftName}</Table.Td>
              <Table.Td>
                {placeOf(pass)}
                {pass.need === 'both' && ' (up and down)'}
              </Table.Td>
              <Table.Td ta="right">
                <Duration ms={Date.parse(pass.losUtc) - Date.parse(pass.aosUtc)} />
              </Table.Td>
              <Table.Td ta="right">{formatDegrees(pass.maxElevationDeg)}</Table.Td>
              <Table.Td ta="right">{pass.bytes > 0 ? formatBytes(pass.bytes) : 'not known'}</Table.Td>
              <Table.Td ta="right">
                {pass.bookedBefore ? (
                  <Anchor component={Link} to={paths.booking(pass.bookedBefore)}>
                    bought before
                  </Anchor>
                ) : (
                  <MoneyText amountMinor={pass.toPayMinor} currency={pass.currency} />
                )}
              </Table.Td>
              {canEdit && (
                <Table.Td>
                  {pass.bookedBefore === null && (
                    <Checkbox
                      aria-label={`Keep in ${pass.spacecraftName} at ${pass.aosUtc}`}
                      checked={keptKeys.includes(pass.key)}
                      onChange={() => onKeep(pass.key)}
                    />
                  )}
                </Table.Td>
              )}
              {canEdit && (
                <Table.Td>
                  {pass.bookedBefore === null && (
                    <Checkbox
                      aria-label={`Strike out ${pass.spacecraftName} at ${pass.aosUtc}`}
                      checked={struckKeys.includes(pass.key)}
                      onChange={() => onStrike(pass.key)}
                    />
                  )}
                </Table.Td>
              )}
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}
