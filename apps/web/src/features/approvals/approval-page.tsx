/** One station as staff judges it: where it stands, what it can do, where it transmits; and the decision. */
import { Anchor, Paper, Skeleton } from '@mantine/core';
import type { Antenna, Station } from '@skyberth/shared';
import { useQueries, useQuery } from '@tanstack/react-query';
import { lazy, Suspense } from 'react';
import { Link, useParams } from 'react-router-dom';
import { MaskEditor } from '../../drawing/mask-editor/mask-editor.js';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { serverNowMs } from '../../lib/server-clock.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { Caution } from '../../ui/caution.js';
import { formatDegrees, formatNumber } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AntennaBadge, StationBadge } from '../../ui/station-badges.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './approvals.module.css';
import { DecisionDesk } from './decision-desk.js';

const WorldMap = lazy(() => import('../../drawing/world-map/world-map.js'));
const COORDINATE_DECIMALS = 5;

export function ApprovalPage() {
  const { id = '' } = useParams();
  const station = useQuery(stationQueries.one(id));
  useTitle(station.data ? `Approval of ${station.data.name}` : 'Approval');
  if (station.error)
    return (
      <ProblemNotice title="The station could not be read" onRetry={() => void station.refetch()}>
        {sentenceOf(station.error)}
      </ProblemNotice>
    );
  if (!station.data) return <Skeleton height={420} />;
  return <OneStation station={station.data} />;
}

function OneStation({ station }: { readonly station: Station }) {
  const antennas = useQueries({ queries: station.antennas.map((antenna) => stationQueries.antenna(antenna.id)) });
  const loaded = antennas.flatMap((one) => (one.data ? [one.data] : []));
  const failed = antennas.find((one) => one.error);
  return (
    <>
      <PageTitle
        title={station.name}
        badge={<StationBadge state={station.state} />}
        actions={
          <Anchor component={Link} to={paths.approvals}>
            All that wait
          </Anchor>
        }
      >
        Of {station.ownerName}. {station.stateNote && `Last note: ${station.stateNote}`}
      </PageTitle>
      <div className={classes.columns}>
        <div className={classes.stack}>
          <Place station={station} />
          {failed && (
            <ProblemNotice title="An antenna could not be read" onRetry={() => void failed.refetch()}>
              {sentenceOf(failed.error)}
            </ProblemNotice>
          )}
          {antennas.some((one) => one.isPending) && <Skeleton height={200} />}
          {station.antennas.length === 0 && <p className={classes.quiet}>It has no antenna.</p>}
          {loaded.map((antenna) => (
            <AntennaCard key={antenna.id} antenna={antenna} />
          ))}
        </div>
        <DecisionDesk station={station} transmits={loaded.some(transmits)} />
      </div>
    </>
  );
}

const transmits = (antenna: Antenna): boolean => antenna.bands.some((band) => band.direction === 'transmit');

function Place({ station }: { readonly station: Station }) {
  return (
    <Paper component="section" withBorder className={classes.card} aria-label="Where it stands">
      <Suspense fallback={<Skeleton height={220} />}>
        <WorldMap
          label={`Where ${station.name} stands`}
          nowMs={serverNowMs()}
          stations={[
            {
              id: station.id,
              name: station.name,
              latitudeDeg: station.latitudeDeg,
              longitudeDeg: station.longitudeDeg,
              kind: 'offered',
            },
          ]}
        />
      </Suspense>
      <Figures columns={3}>
        <Figure label="Latitude" value={formatDegrees(station.latitudeDeg, COORDINATE_DECIMALS)} />
        <Figure label="Longitude" value={formatDegrees(station.longitudeDeg, COORDINATE_DECIMALS)} />
        <Figure label="Altitude" value={formatNumber(station.altitudeM, 1)} unit="m" />
        <Figure label="Country" value={station.country} />
        <Figure label="Clock" value={station.timeZone.replaceAll('_', ' ')} />
        <Figure label="Contact person" value={station.contactName || 'nobody named'} note={station.contactPhone} />
      </Figures>
      {station.description && <p className={classes.description}>{station.description}</p>}
    </Paper>
  );
}

function AntennaCard({ antenna }: { readonly antenna: Antenna }) {
  const mask = antenna.mask.map(([azimuthDeg, elevationDeg], index) => ({ id: `m${index}`, azimuthDeg, elevationDeg }));
  return (
    <Paper component="section" withBorder className={classes.card} aria-label={`Antenna ${antenna.name}`}>
      <header className={classes.cardHead}>
        <h2>{antenna.name}</h2>
        <AntennaBadge state={antenna.state} />
      </header>
      <div className={classes.antenna}>
        <MaskEditor
          label={`Horizon mask of ${antenna.name}`}
          points={mask}
          onPick={() => undefined}
          onChange={() => undefined}
          readOnly
        />
        <div className={classes.stack}>
          <Figures columns={2}>
            <Figure label="Diameter" value={formatNumber(antenna.diameterM, 1)} unit="m" />
            <Figure label="Mount" value={antenna.mount} />
            <Figure label="Lowest to receive" value={formatDegrees(antenna.lowestReceiveDeg)} />
            <Figure label="Lowest to transmit" value={formatDegrees(antenna.lowestTransmitDeg)} />
          </Figures>
          <Bands antenna={antenna} />
          {antenna.missing.length > 0 && <p className={classes.quiet}>Still needed: {antenna.missing.join(' ')}</p>}
        </div>
      </div>
      {transmits(antenna) && (
        <Caution title="It can transmit">
          Approval grants no spectrum right and replaces no licence. Look at the owner's papers for these bands and this
          place; local codes and licensed practitioners decide about people near the beam.
        </Caution>
      )}
    </Paper>
  );
}

function Bands({ antenna }: { readonly antenna: Antenna }) {
  if (antenna.bands.length === 0) return <p className={classes.quiet}>No band is described.</p>;
  return (
    <ul className={classes.bands}>
      {antenna.bands.map((band) => (
        <li key={band.id} data-direction={band.direction}>
          <strong>
            {band.direction} {band.band}
          </strong>
          , {band.fromMhz} to {band.toMhz} MHz, {band.polarisations.join(' and ')}
          {band.gOverTDbK !== null && `, G/T ${formatNumber(band.gOverTDbK, 1)} dB/K`}
          {band.eirpDbw !== null && `, at most ${formatNumber(band.eirpDbw, 1)} dBW`}
        </li>
      ))}
    </ul>
  );
}
