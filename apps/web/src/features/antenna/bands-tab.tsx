import { Anchor, Button, Modal, Table } from '@mantine/core';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type AntennaBand, routes } from '@skyberth/shared';
import { useState } from 'react';
import { call } from '../../lib/api-client.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { Caution } from '../../ui/caution.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatNumber } from '../../ui/format.js';
import classes from './antenna.module.css';
import { BandForm, type BandInput } from './band-form.js';
import type { TabProps } from './tab-props.js';
import { useAntennaChange } from './use-antenna-change.js';

const inputOf = ({ id: _id, ...band }: AntennaBand): BandInput => band;
const capital = (word: string): string => word.slice(0, 1).toUpperCase() + word.slice(1);
const polarisationText = (band: AntennaBand): string => band.polarisations.join(', ');

/** The bands of the antenna; the API keeps them as one list, so every act sends the whole of it. */
export function BandsTab({ antenna, mayWrite }: TabProps) {
  const [open, setOpen] = useState<number | 'new' | null>(null);
  const save = useAntennaChange(
    (bands: BandInput[]) => call(routes.setBands, { params: { id: antenna.id }, body: { bands } }),
    'The bands are saved; what is for sale follows them at once.',
  );
  const inputs = antenna.bands.map(inputOf);
  const keep = async (band: BandInput) => {
    await save.mutateAsync(typeof open === 'number' ? inputs.with(open, band) : [...inputs, band]);
    setOpen(null);
  };
  const askRemove = (index: number, band: AntennaBand) =>
    modals.openConfirmModal({
      title: `Remove ${band.direction} ${band.band}?`,
      children: 'Nobody can book it from now on. Sold contacts stay.',
      labels: { confirm: 'Remove the band', cancel: 'Keep it' },
      confirmProps: { color: 'buoy', variant: 'outline' },
      onConfirm: () =>
        save.mutate(inputs.toSpliced(index, 1), {
          onError: (error) =>
            notifications.show({ title: 'The band stays', message: sentenceOf(error), color: 'buoy' }),
        }),
    });
  const add = <Button onClick={() => setOpen('new')}>Add a band</Button>;
  const edited = typeof open === 'number' ? antenna.bands[open] : undefined;
  return (
    <section aria-label="Bands">
      {antenna.bands.length === 0 ? (
        <EmptyState title="No band yet" action={mayWrite && add}>
          A receive band needs its range, polarisations and G/T; a transmit band its EIRP.
        </EmptyState>
      ) : (
        <>
          <BandTable antenna={antenna} mayWrite={mayWrite} onEdit={setOpen} onRemove={askRemove} />
          {mayWrite && <div className={classes.foot}>{add}</div>}
        </>
      )}
      {antenna.bands.some((band) => band.direction === 'transmit') && (
        <Caution title="Transmit band">
          <p>
            Sold only to spacecraft you have cleared. The mask bounds what is sold; it is no safety limit. Exposure of
            people near the beam stays with your licence, local rules and the interlock.
          </p>
        </Caution>
      )}
      <Modal
        opened={open !== null}
        onClose={() => setOpen(null)}
        title={edited ? `Change ${edited.direction} ${edited.band}` : 'Add a band'}
        size="lg"
        closeButtonProps={{ 'aria-label': 'Close' }}
      >
        {open !== null && <BandForm band={edited ?? null} onKeep={keep} />}
      </Modal>
    </section>
  );
}

interface BandTableProps extends Pick<TabProps, 'antenna' | 'mayWrite'> {
  readonly onEdit: (index: number) => void;
  readonly onRemove: (index: number, band: AntennaBand) => void;
}

function BandTable({ antenna, mayWrite, onEdit, onRemove }: BandTableProps) {
  const none = <span className={classes.quiet}>none</span>;
  const lowestOf = (band: AntennaBand) =>
    band.lowestElevationDeg ?? (band.direction === 'receive' ? antenna.lowestReceiveDeg : antenna.lowestTransmitDeg);
  return (
    <div className={classes.scroll}>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Direction</Table.Th>
            <Table.Th>Range, MHz</Table.Th>
            <Table.Th>Polarisation</Table.Th>
            <Table.Th ta="right">G/T, dB/K</Table.Th>
            <Table.Th ta="right">EIRP, dBW</Table.Th>
            <Table.Th ta="right">Lowest, °</Table.Th>
            {mayWrite && (
              <Table.Th>
                <span className="sk-hidden">Change</span>
              </Table.Th>
            )}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {antenna.bands.map((band, index) => (
            <Table.Tr key={band.id}>
              <Table.Td fw={700}>
                {capital(band.direction)}, {band.band}
              </Table.Td>
              <Table.Td style={{ whiteSpace: 'nowrap' }}>
                {band.fromMhz} to {band.toMhz}
              </Table.Td>
              <Table.Td>{polarisationText(band)}</Table.Td>
              <Table.Td ta="right">{band.gOverTDbK === null ? none : formatNumber(band.gOverTDbK, 1)}</Table.Td>
              <Table.Td ta="right">{band.eirpDbw === null ? none : formatNumber(band.eirpDbw, 1)}</Table.Td>
              <Table.Td ta="right">{formatNumber(lowestOf(band), 1)}</Table.Td>
              {mayWrite && (
                <Table.Td>
                  <div className={classes.rowActs}>
                    <Anchor
                      component="button"
                      type="button"
                      onClick={() => onEdit(index)}
                      aria-label={`Change ${band.direction} ${band.band}`}
                    >
                      Change
                    </Anchor>
                    <Anchor
                      component="button"
                      type="button"
                      onClick={() => onRemove(index, band)}
                      aria-label={`Remove ${band.direction} ${band.band}`}
                    >
                      Remove
                    </Anchor>
                  </div>
                </Table.Td>
              )}
            </Table.Tr>
          ))}
        </Table.Tbody>
      </Table>
    </div>
  );
}
