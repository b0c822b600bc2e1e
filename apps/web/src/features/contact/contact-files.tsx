import { Anchor, Table } from '@mantine/core';
import { type Booking, type ParamsInput, routes } from '@skyberth/shared';
import { addressOf } from '../../lib/api-client.js';
import classes from './contact.module.css';

type FileName = ParamsInput<typeof routes.bookingFile>['file'];

const FILES: readonly { file: FileName; title: string; format: string }[] = [
  { file: 'pointing.csv', title: 'Pointing table', format: 'CSV, azimuth and elevation' },
  { file: 'frequency.csv', title: 'Frequency table', format: 'CSV, with Doppler' },
  { file: 'ephemeris.oem', title: 'Ephemeris', format: 'CCSDS OEM' },
  { file: 'elements.omm', title: 'Elements used', format: 'CCSDS OMM' },
  { file: 'contact.ics', title: 'Calendar entry', format: 'iCalendar' },
];

export function ContactFiles({ booking }: { readonly booking: Booking }) {
  return (
    <section aria-labelledby="files-title">
      <h2 id="files-title" className={classes.heading}>
        Files
      </h2>
      <Table>
        <Table.Tbody>
          {FILES.map((one) => (
            <Table.Tr key={one.file}>
              <Table.Td>
                <Anchor
                  href={addressOf(routes.bookingFile, { params: { id: booking.id, file: one.file } })}
                  download={`berth-${booking.number}-${one.file}`}
                >
                  {one.title}
                </Anchor>
              </Table.Td>
              <Table.Td>{one.format}</Table.Td>
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
      <p className={classes.small}>
        A dish driven by the pointing table moves without warning, and a track near the Sun can damage a receive chain:
        the station’s own limits and safety rules come first.
      </p>
    </section>
  );
}
