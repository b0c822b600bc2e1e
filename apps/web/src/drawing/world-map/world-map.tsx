/** Stations, what they see, ground tracks and night on one sheet. Load it lazily: the coastline weighs more than a page. */
import { geoCircle, geoEqualEarth, geoGraticule, geoPath } from 'd3-geo';
import { useId, useMemo } from 'react';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import landTopology from 'world-atlas/land-110m.json' with { type: 'json' };
import { formatHourMinute } from '../../ui/format.js';
import { antipode, subsolarPoint } from './sun.js';
import classes from './world-map.module.css';
import type { MapStation, MapTrack, WorldMapProps } from './world-map-types.js';

const WIDTH_PX = 1000;
const HEIGHT_PX = 490;
/** The Sun's upper limb touches the horizon with its middle this far below it. Source: common practice for rise and set. */
const SUNSET_DEPTH_DEG = 0.833;

const projection = geoEqualEarth().fitExtent(
  [
    [4, 4],
    [WIDTH_PX - 4, HEIGHT_PX - 4],
  ],
  { type: 'Sphere' },
);
const path = geoPath(projection);
const topology = landTopology as unknown as Topology<{ land: GeometryCollection }>;
const LAND = path(feature(topology, topology.objects.land)) ?? '';
const SPHERE = path({ type: 'Sphere' }) ?? '';
const GRATICULE = path(geoGraticule().step([30, 30])()) ?? '';

/** The map; default export so that it can be loaded lazily. */
export default function WorldMap({
  label,
  nowMs,
  stations,
  tracks = [],
  pickedStationId = null,
  onPickStation,
}: WorldMapProps) {
  const clipId = useId();
  // Night moves a quarter of a degree a minute: once a minute is enough.
  const minuteMs = Math.floor(nowMs / 60_000) * 60_000;
  const night = useMemo(() => {
    const centre = antipode(subsolarPoint(minuteMs));
    return (
      path(
        geoCircle()
          .center(centre)
          .radius(90 - SUNSET_DEPTH_DEG)(),
      ) ?? ''
    );
  }, [minuteMs]);
  return (
    <figure className={classes.map} aria-label={label}>
      <svg viewBox={`0 0 ${WIDTH_PX} ${HEIGHT_PX}`} role="presentation">
        <clipPath id={clipId}>
          <path d={SPHERE} />
        </clipPath>
        <g clipPath={`url(#${clipId})`}>
          <path d={SPHERE} className={classes.sea} />
          <path d={GRATICULE} className={classes.graticule} />
          <path d={LAND} className={classes.land} />
          <path d={night} className={classes.night} />
          {stations.map((station) => (
            <Footprint key={station.id} station={station} isPicked={station.id === pickedStationId} />
          ))}
          {tracks.map((track) => (
            <Track key={track.id} track={track} nowMs={nowMs} />
          ))}
        </g>
        <path d={SPHERE} className={classes.edge} />
        {placed(stations).map((one) => (
          <StationMark
            key={one.station.id}
            {...one}
            isPicked={one.station.id === pickedStationId}
            onPick={onPickStation}
          />
        ))}
      </svg>
      <MapWords stations={stations} tracks={tracks} />
    </figure>
  );
}

interface PlacedStation {
  readonly station: MapStation;
  readonly x: number;
  readonly y: number;
  readonly labelY: number;
}

const LABEL_PX = 15;

/** Places stations and moves a label down where it would cover the one before. */
function placed(stations: readonly MapStation[]): PlacedStation[] {
  const result: PlacedStation[] = [];
  for (const station of stations) {
    const at = projection([station.longitudeDeg, station.latitudeDeg]);
    if (!at) continue;
    const [x, y] = at;
    let labelY = y;
    while (result.some((one) => Math.abs(one.x - x) < 110 && Math.abs(one.labelY - labelY) < LABEL_PX))
      labelY += LABEL_PX;
    result.push({ station, x, y, labelY });
  }
  return result;
}

function StationMark({
  station,
  x,
  y,
  labelY,
  isPicked,
  onPick,
}: PlacedStation & { isPicked: boolean; onPick: ((id: string) => void) | undefined }) {
  const isLeft = x > WIDTH_PX - 140;
  const mark = (
    <>
      {isPicked && <circle cx={x} cy={y} r="11" className={classes.ring} />}
      <circle cx={x} cy={y} r="5" className={classes.station} data-kind={station.kind ?? 'offered'} />
      <text
        x={x + (isLeft ? -9 : 9)}
        y={labelY}
        textAnchor={isLeft ? 'end' : 'start'}
        className={classes.name}
        data-picked={isPicked || undefined}
      >
        {station.name}
      </text>
    </>
  );
  if (!onPick) return <g>{mark}</g>;
  return (
    // biome-ignore lint/a11y/useSemanticElements: an HTML button cannot stand inside a drawing
    <g
      role="button"
      tabIndex={0}
      aria-pressed={isPicked}
      aria-label={station.name}
      className={classes.button}
      onClick={() => onPick(station.id)}
      onKeyDown={(event) => {
        if (event.key !== 'Enter' && event.key !== ' ') return;
        event.preventDefault();
        onPick(station.id);
      }}
    >
      <circle cx={x} cy={y} r="16" fill="transparent" />
      {mark}
    </g>
  );
}

function Footprint({ station, isPicked }: { station: MapStation; isPicked: boolean }) {
  if (!station.footprintDeg) return null;
  const circle = geoCircle().center([station.longitudeDeg, station.latitudeDeg]).radius(station.footprintDeg)();
  return <path d={path(circle) ?? ''} className={classes.footprint} data-picked={isPicked || undefined} />;
}

/** The way already flown is solid, the way to come dashed, the vessel between. */
function Track({ track, nowMs }: { track: MapTrack; nowMs: number }) {
  const line = (points: MapTrack['points']) =>
    path({ type: 'LineString', coordinates: points.map((one) => [one.longitudeDeg, one.latitudeDeg]) }) ?? '';
  const ahead = track.points.findIndex((one) => one.atMs > nowMs);
  const split = ahead < 0 ? track.points.length : ahead;
  const now = track.points[split - 1];
  const at = now && split < track.points.length ? projection([now.longitudeDeg, now.latitudeDeg]) : null;
  return (
    <>
      <path d={line(track.points.slice(0, split))} className={classes.flown} />
      <path d={line(track.points.slice(Math.max(0, split - 1)))} className={classes.ahead} />
      {at && (
        <>
          <rect
            x={at[0] - 5}
            y={at[1] - 5}
            width="10"
            height="10"
            className={classes.vessel}
            transform={`rotate(45 ${at[0]} ${at[1]})`}
          />
          <text x={at[0]} y={at[1] - 12} textAnchor="middle" className={classes.name} data-picked="true">
            {track.short}
          </text>
        </>
      )}
    </>
  );
}

function MapWords({ stations, tracks }: { stations: readonly MapStation[]; tracks: readonly MapTrack[] }) {
  return (
    <ul className="sk-hidden">
      {stations.map((one) => (
        <li key={one.id}>
          {one.name}: latitude {one.latitudeDeg.toFixed(2)}°, longitude {one.longitudeDeg.toFixed(2)}°
        </li>
      ))}
      {tracks.map((one) => {
        const [first, last] = [one.points[0], one.points.at(-1)];
        return (
          <li key={one.id}>
            {one.name}: track from {first ? formatHourMinute(first.atMs) : ''} to{' '}
            {last ? formatHourMinute(last.atMs) : ''} UTC
          </li>
        );
      })}
    </ul>
  );
}
