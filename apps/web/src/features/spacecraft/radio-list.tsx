/** What a spacecraft speaks and hears with. */
import { Anchor, Paper } from '@mantine/core';
import type { Radio, Spacecraft } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { Caution } from '../../ui/caution.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatNumber } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import { Figure, Figures } from '../../ui/values.js';
import { polarisationWords, rateWords } from './craft-words.js';
import classes from './spacecraft.module.css';

interface RadioListProps {
  readonly craft: Spacecraft;
  readonly mayWrite: boolean;
}

export function RadioList({ craft, mayWrite }: RadioListProps) {
  const change = mayWrite && (
    <Anchor component={Link} to={`${paths.editSpacecraft(craft.id)}#radios`}>
      {craft.radios.length > 0 ? 'Change the radios' : 'Add a radio'}
    </Anchor>
  );
  const hasUplink = craft.radios.some((radio) => radio.direction === 'uplink');
  return (
    <section aria-labelledby="radios">
      <div className={classes.headingLine}>
        <h2 id="radios" className={classes.heading}>
          Radios
        </h2>
        {craft.radios.length > 0 && change}
      </div>
      {craft.radios.length === 0 && (
        <Paper withBorder>
          <EmptyState level={3} title="No radio yet" action={change}>
            An antenna can be matched only to a radio: its band, frequency and polarisation, and the figures that say
            whether the link closes.
          </EmptyState>
        </Paper>
      )}
      <div className={classes.radios}>
        {craft.radios.map((radio) => (
          <RadioCard key={radio.id} radio={radio} />
        ))}
      </div>
      {hasUplink && (
        <Caution title="Sending to it needs a clearance">
          <p>
            For this spacecraft at each station and band. Your licence, local rules and the station&rsquo;s own
            interlock decide whether anybody may transmit; Skyberth replaces none of them.
          </p>
        </Caution>
      )}
    </section>
  );
}

function RadioCard({ radio }: { readonly radio: Radio }) {
  const isDown = radio.direction === 'downlink';
  return (
    <Paper component="article" withBorder className={classes.card} aria-labelledby={`radio-${radio.id}`}>
      <h3 id={`radio-${radio.id}`} className={classes.radioName}>
        <Sign shape={isDown ? 'down' : 'up'} />
        {radio.name}
        <span className={classes.quiet}>
          {radio.band} band {radio.direction}
        </span>
      </h3>
      <Figures columns={2}>
        <Figure label="Centre frequency" value={formatNumber(radio.centreFrequencyMhz, 3)} unit="MHz" />
        <Figure label="Bandwidth" value={formatNumber(radio.bandwidthKhz, radio.bandwidthKhz % 1 ? 1 : 0)} unit="kHz" />
        <Figure label="Data rate" value={rateWords(radio.dataRateBps)} />
        <Figure label="Polarisation" value={polarisationWords(radio.polarisation)} />
        <Figure label="Modulation" value={radio.modulation} />
        <Figure label="Coding" value={radio.coding} />
        {isDown ? (
          <>
            <Figure label="EIRP" {...decibels(radio.eirpDbw, 'dBW')} />
            <Figure label="Eb/N0 needed" {...decibels(radio.requiredEbN0Db, 'dB')} />
          </>
        ) : (
          <Figure label="EIRP needed" {...decibels(radio.requiredEirpDbw, 'dBW')} />
        )}
        <Figure label="Pointing loss" {...decibels(radio.pointingLossDb, 'dB')} />
      </Figures>
    </Paper>
  );
}

/** A figure in decibels, or the words for one that was not given, which has no unit. */
function decibels(value: number | null, unit: string): { value: string; unit?: string; note?: string } {
  if (value === null) return { value: 'not given', note: 'no link margin without it' };
  return { value: formatNumber(value, 1), unit };
}
