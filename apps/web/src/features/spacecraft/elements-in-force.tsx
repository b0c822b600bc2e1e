/** The set that passes are computed from now, and how far it can be trusted. */
import { Anchor, Paper } from '@mantine/core';
import type { ElementSummary, Spacecraft } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { DayTime } from '../../ui/day-time.js';
import { EmptyState } from '../../ui/empty-state.js';
import { formatNumber } from '../../ui/format.js';
import { Degrees, Duration, Figure, Figures } from '../../ui/values.js';
import { ageWords, errorWords, formatWords, heightWords, periodMs, trustWords } from './element-words.js';
import classes from './spacecraft.module.css';
import { TrustDrawing } from './trust-drawing.js';

interface ElementsInForceProps {
  readonly craft: Spacecraft;
  readonly mayWrite: boolean;
}

export function ElementsInForce({ craft, mayWrite }: ElementsInForceProps) {
  const give = mayWrite && (
    <Anchor component={Link} to={`${paths.addElements}?craft=${craft.id}`}>
      Give {craft.elements ? 'newer' : 'its'} elements
    </Anchor>
  );
  return (
    <section aria-labelledby="in-force">
      <h2 id="in-force" className={classes.heading}>
        Elements in force
      </h2>
      {craft.elements ? (
        <>
          {craft.freshness !== 'fresh' && (
            <p className={classes.note} data-bad={craft.freshness === 'stale' || undefined}>
              {trustWords(craft.freshness, craft.elements.timingErrorS)} {give}
            </p>
          )}
          <InForce elements={craft.elements} />
          {craft.state === 'active' && <TrustDrawing elements={craft.elements} />}
        </>
      ) : (
        <Paper withBorder>
          <EmptyState level={3} title="No elements yet" action={give}>
            Without them nobody knows where it is, and no pass can be found. A TLE or an OMM is enough.
          </EmptyState>
        </Paper>
      )}
    </section>
  );
}

function InForce({ elements }: { readonly elements: ElementSummary }) {
  const isPhone = useIsPhone();
  return (
    <Figures columns={isPhone ? 2 : 4} ruled>
      <Figure
        label="Epoch"
        value={<DayTime atMs={Date.parse(elements.epochUtc)} />}
        note={ageWords(elements.ageH)}
        size="large"
      />
      <Figure
        label="AOS and LOS known to"
        value={errorWords(elements.timingErrorS)}
        note="one sigma, estimated from the age"
        size="large"
      />
      <Figure label="Height, perigee × apogee" value={heightWords(elements)} unit="km" size="large" />
      <Figure
        label="One turn"
        value={<Duration ms={periodMs(elements.meanMotionRevPerDay)} />}
        note={`${formatNumber(elements.meanMotionRevPerDay, 4)} turns a day`}
        size="large"
      />
      <Figure label="Inclination" value={<Degrees deg={elements.inclinationDeg} decimals={2} />} />
      <Figure label="Eccentricity" value={formatNumber(elements.eccentricity, 5)} />
      <Figure label="Came as" value={formatWords(elements.format)} note={elements.source} />
      <Figure
        label="Added"
        value={<DayTime atMs={Date.parse(elements.addedUtc)} />}
        note={elements.addedByName ? `by ${elements.addedByName}` : undefined}
      />
    </Figures>
  );
}
