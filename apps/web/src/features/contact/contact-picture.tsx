import type { Booking, PassDetail } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { ContactCurves } from '../../drawing/curves/contact-curves.js';
import { SkyPlot } from '../../drawing/sky-plot/sky-plot.js';
import { liveQueries } from '../../lib/live.js';
import { usePositionAt } from '../../lib/position.js';
import { useNow } from '../../lib/use-now.js';
import { formatDegrees, formatDuration, formatNumber } from '../../ui/format.js';
import { sunText } from '../../ui/sun-text.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './contact.module.css';
import { liveAt, trackOf } from './contact-live.js';
import { contactChart, readingsAt } from './contact-panels.js';

interface ContactPictureProps {
  readonly booking: Booking;
  readonly detail: PassDetail;
}

/** Sky plot and figures beside the curves; the live position is worked out here each second, from the track. */
export function ContactPicture({ booking, detail }: ContactPictureProps) {
  const nowMs = useNow();
  const label = `${booking.spacecraftName} at ${booking.antennaName}`;
  const { aosUtc, losUtc, setupStartsUtc, teardownEndsUtc } = booking;
  const chart = useMemo(
    () => contactChart(label, { aosUtc, losUtc, setupStartsUtc, teardownEndsUtc }, detail),
    [label, aosUtc, losUtc, setupStartsUtc, teardownEndsUtc, detail],
  );
  const sky = useMemo(
    () => ({
      mask: detail.antenna.mask.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg })),
      track: trackOf(detail),
    }),
    [detail],
  );
  const readings = readingsAt(detail, nowMs);
  const panels = chart.panels.map((panel) => {
    const reading = readings[panel.id];
    return reading ? { ...panel, reading } : panel;
  });
  const isNear = nowMs >= chart.aosMs && nowMs <= chart.losMs;
  return (
    <div className={classes.drawings}>
      <div>
        <SkyPlot
          label={label}
          {...sky}
          aosMs={chart.aosMs}
          losMs={chart.losMs}
          sun={detail.sun}
          {...(isNear ? { nowMs } : {})}
        />
        <LiveFigures booking={booking} detail={detail} nowMs={nowMs} />
      </div>
      <ContactCurves {...chart} panels={panels} nowMs={nowMs} />
    </div>
  );
}

function LiveFigures({ booking, detail, nowMs }: ContactPictureProps & { readonly nowMs: number }) {
  const track = useMemo(() => trackOf(detail), [detail]);
  const isRunning = nowMs >= Date.parse(booking.aosUtc) && nowMs <= Date.parse(booking.losUtc);
  const orbit = useQuery({ ...liveQueries.orbit(booking.id), enabled: isRunning });
  const positionAt = usePositionAt(orbit.data);
  const fromTrack = liveAt(track, nowMs);
  const live = fromTrack && { ...fromTrack, ...(positionAt ? positionAt(nowMs) : {}) };
  if (live)
    return (
      <Figures columns={3} ruled>
        <Figure label="Azimuth" value={formatDegrees(live.azimuthDeg)} size="large" />
        <Figure label="Elevation" value={formatDegrees(live.elevationDeg)} size="large" />
        <Figure label="Range" value={formatNumber(live.rangeKm)} unit="km" size="large" />
        <Figure label="Turning at" value={formatNumber(live.turningDegPerS, 2)} unit="°/s" size="large" />
        <Figure label="Range rate" value={formatNumber(live.rangeRateKmPerS, 2)} unit="km/s" size="large" />
        <Figure label="Spacecraft" value={detail.illumination} />
      </Figures>
    );
  const [first, last] = [track[0], track.at(-1)];
  return (
    <Figures columns={3} ruled>
      <Figure label="AOS azimuth" value={first ? formatDegrees(first.azimuthDeg) : 'unknown'} size="large" />
      <Figure label="LOS azimuth" value={last ? formatDegrees(last.azimuthDeg) : 'unknown'} size="large" />
      <Figure label="Highest" value={formatDegrees(booking.maxElevationDeg)} size="large" />
      <Figure
        label="Length"
        value={formatDuration(Date.parse(booking.losUtc) - Date.parse(booking.aosUtc))}
        size="large"
      />
      <Figure label="Sun, at its closest" value={sunText(detail.sun)} size="large" />
      <Figure label="Spacecraft" value={detail.illumination} />
    </Figures>
  );
}
