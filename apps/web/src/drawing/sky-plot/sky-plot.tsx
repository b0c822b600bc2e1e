/** The sky over an antenna: its horizon as shore, a pass as a wake, the Sun and how far to keep off it. */
import { useId } from 'react';
import { formatDegrees, formatHourMinute } from '../../ui/format.js';
import { type Point, pathThrough, type Rose, toPoint } from '../common/rose.js';
import { RoseRim, RoseWater } from '../common/rose-ground.js';
import type { SkyPlotProps, SunPlace, TrackPoint } from './sky-plot-types.js';
import { headingAt, minuteTicks, skyWords, trackAt, trackBetween } from './track.js';

const SIZES = {
  large: { boxPx: 400, radiusPx: 168, tickPx: 5, trackPx: 2.4 },
  small: { boxPx: 160, radiusPx: 60, tickPx: 3.2, trackPx: 2 },
} as const;
const LABEL_EVERY_MIN = 2;
const MINUTE_MS = 60_000;

/** Draws the plot; it fills the width it is given, up to its own size. */
export function SkyPlot(props: SkyPlotProps) {
  const { size = 'large', mask, track, aosMs, losMs, nowMs, sun } = props;
  const measures = SIZES[size];
  const isLarge = size === 'large';
  const rose: Rose = { centreX: measures.boxPx / 2, centreY: measures.boxPx / 2, radiusPx: measures.radiusPx };
  const titleId = useId();
  const wordsId = useId();
  const isLive = nowMs !== undefined && nowMs > aosMs && nowMs < losMs;
  const flownToMs = nowMs === undefined ? losMs : Math.max(aosMs, Math.min(losMs, nowMs));
  const points = (fromMs: number, toMs: number) =>
    trackBetween(track, fromMs, toMs).map((one) => toPoint(rose, one.azimuthDeg, one.elevationDeg));
  const flown = flownToMs > aosMs ? points(aosMs, flownToMs) : [];
  const ahead = flownToMs < losMs ? points(flownToMs, losMs) : [];
  const vessel = isLive ? trackAt(track, nowMs) : null;
  return (
    <svg
      viewBox={`0 0 ${measures.boxPx} ${measures.boxPx}`}
      style={{ display: 'block', width: '100%', maxWidth: measures.boxPx, height: 'auto' }}
      role="img"
      aria-labelledby={titleId}
      aria-describedby={wordsId}
    >
      <title id={titleId}>Sky plot: {props.label}</title>
      <desc id={wordsId}>{skyWords(props)}</desc>
      <RoseWater rose={rose} mask={mask} isLarge={isLarge} />
      {isLarge && <CrossTicks rose={rose} />}
      {sun && sun.elevationDeg > -sun.keepOffDeg && <SunMark rose={rose} sun={sun} isLarge={isLarge} />}
      {vessel ? (
        <Wake points={flown} />
      ) : (
        <path
          d={pathThrough(flown)}
          fill="none"
          stroke="var(--sk-shoal)"
          strokeOpacity="0.45"
          strokeWidth={isLarge ? 12 : 7}
          strokeLinejoin="round"
        />
      )}
      <path
        d={pathThrough(flown)}
        fill="none"
        stroke="var(--sk-deep)"
        strokeWidth={measures.trackPx}
        strokeLinejoin="round"
      />
      <path
        d={pathThrough(ahead)}
        fill="none"
        stroke="var(--sk-deep)"
        strokeWidth={measures.trackPx - 0.5}
        strokeDasharray="5 3.5"
      />
      <Ticks {...{ rose, track, aosMs, losMs, isLarge }} />
      <Ends rose={rose} track={track} aosMs={aosMs} losMs={losMs} isLarge={isLarge} />
      {vessel && <Vessel rose={rose} track={track} at={vessel} />}
      <RoseRim rose={rose} isLarge={isLarge} />
    </svg>
  );
}

/** The wake widens and fades behind the vessel. */
function Wake({ points }: { readonly points: readonly Point[] }) {
  const gradientId = useId();
  const first = points[0];
  const last = points.at(-1);
  if (!first || !last || points.length < 2) return null;
  const side = (sign: 1 | -1) =>
    points.map((point, index) => {
      const next = points[Math.min(index + 1, points.length - 1)] as Point;
      const previous = points[Math.max(0, index - 1)] as Point;
      const length = Math.hypot(next.x - previous.x, next.y - previous.y) || 1;
      const widthPx = 2 + 17 * (1 - index / (points.length - 1));
      return {
        x: point.x - (sign * widthPx * (next.y - previous.y)) / length,
        y: point.y + (sign * widthPx * (next.x - previous.x)) / length,
      };
    });
  return (
    <>
      <linearGradient id={gradientId} gradientUnits="userSpaceOnUse" x1={first.x} y1={first.y} x2={last.x} y2={last.y}>
        <stop offset="0" stopColor="var(--sk-shoal)" stopOpacity="0.1" />
        <stop offset="1" stopColor="var(--sk-shoal)" stopOpacity="0.75" />
      </linearGradient>
      <path d={pathThrough([...side(1), ...side(-1).reverse()], true)} fill={`url(#${gradientId})`} />
    </>
  );
}

function Ticks({
  rose,
  track,
  aosMs,
  losMs,
  isLarge,
}: {
  rose: Rose;
  track: readonly TrackPoint[];
  aosMs: number;
  losMs: number;
  isLarge: boolean;
}) {
  const ticks = minuteTicks(rose, track, aosMs, losMs, isLarge ? 5 : 3.2);
  const isLabelled = (atMs: number) =>
    isLarge &&
    (atMs / MINUTE_MS) % LABEL_EVERY_MIN === 0 &&
    atMs - aosMs > 0.4 * MINUTE_MS &&
    losMs - atMs > 0.4 * MINUTE_MS;
  return ticks.map((tick) => (
    <g key={tick.atMs}>
      <path d={pathThrough([tick.from, tick.to])} stroke="var(--sk-ink)" strokeWidth="1.4" />
      {isLabelled(tick.atMs) && (
        <text
          x={tick.label.x}
          y={tick.label.y}
          textAnchor={tick.label.x < tick.from.x ? 'end' : 'start'}
          dominantBaseline="central"
          fontSize="12"
          fontWeight="600"
          fill="var(--sk-ink)"
          stroke="var(--sk-sea)"
          strokeWidth="3"
          paintOrder="stroke"
        >
          {formatHourMinute(tick.atMs)}
        </text>
      )}
    </g>
  ));
}

/** Triangle at AOS, square at LOS. */
function Ends({
  rose,
  track,
  aosMs,
  losMs,
  isLarge,
}: {
  rose: Rose;
  track: readonly TrackPoint[];
  aosMs: number;
  losMs: number;
  isLarge: boolean;
}) {
  const [aos, los] = [trackAt(track, aosMs), trackAt(track, losMs)];
  const size = isLarge ? 5.2 : 3.8;
  const paint = { fill: 'var(--sk-sheet)', stroke: 'var(--sk-deep)', strokeWidth: isLarge ? 1.8 : 1.6 };
  const p = aos && toPoint(rose, aos.azimuthDeg, aos.elevationDeg);
  const q = los && toPoint(rose, los.azimuthDeg, los.elevationDeg);
  return (
    <>
      {p && <path d={`M${p.x} ${p.y - size * 1.1} l${size} ${size * 1.9} h${-2 * size} Z`} {...paint} />}
      {q && <rect x={q.x - size} y={q.y - size} width={2 * size} height={2 * size} {...paint} />}
    </>
  );
}

function Vessel({ rose, track, at }: { rose: Rose; track: readonly TrackPoint[]; at: TrackPoint }) {
  const place = toPoint(rose, at.azimuthDeg, at.elevationDeg);
  const way = headingAt(rose, track, at.atMs) ?? { x: 0, y: -1 };
  const turnDeg = (Math.atan2(way.x, -way.y) * 180) / Math.PI;
  return (
    <g transform={`translate(${place.x} ${place.y}) rotate(${turnDeg})`}>
      <path
        d="M0 -12 C6 -6 6.5 3 5 10 H-5 C-6.5 3 -6 -6 0 -12 Z"
        fill="var(--sk-brass)"
        stroke="var(--sk-ink)"
        strokeWidth="1.7"
        strokeLinejoin="round"
      />
    </g>
  );
}

/** The Sun with its keep-off circle. Its words stand in the corner outside the rim, so that they cross no shore. */
function SunMark({ rose, sun, isLarge }: { rose: Rose; sun: SunPlace; isLarge: boolean }) {
  const { x, y } = toPoint(rose, sun.azimuthDeg, Math.max(0, sun.elevationDeg));
  const keepOffPx = Math.max(7, (rose.radiusPx * sun.keepOffDeg) / 90);
  const side = x > rose.centreX ? 1 : -1;
  const boxPx = 2 * rose.centreX;
  const words = { x: side === 1 ? boxPx - 3 : 3, y: y > rose.centreY ? boxPx - 9 : 10 };
  const corner = { x: words.x - side * 40, y: words.y + (y > rose.centreY ? -9 : 9) };
  const reach = Math.hypot(corner.x - x, corner.y - y);
  const start = { x: x + ((corner.x - x) * keepOffPx) / reach, y: y + ((corner.y - y) * keepOffPx) / reach };
  return (
    <g>
      <circle
        cx={x}
        cy={y}
        r={keepOffPx}
        fill="var(--sk-brass-wash)"
        stroke="var(--sk-brass-ink)"
        strokeWidth="1.4"
        strokeDasharray="3 2.4"
      />
      <circle cx={x} cy={y} r={isLarge ? 4.2 : 3} fill="var(--sk-brass)" stroke="var(--sk-ink)" strokeWidth="1" />
      {isLarge && (
        <>
          <path d={pathThrough([start, corner])} stroke="var(--sk-brass-ink)" strokeWidth="1" strokeDasharray="3 2.4" />
          <text
            x={words.x}
            y={words.y}
            textAnchor={side === 1 ? 'end' : 'start'}
            dominantBaseline="central"
            fontSize="12"
            fontWeight="700"
            fill="var(--sk-brass-ink)"
          >
            Sun, keep {formatDegrees(sun.keepOffDeg, 0)} off
          </text>
        </>
      )}
    </g>
  );
}

function CrossTicks({ rose }: { readonly rose: Rose }) {
  const { centreX: x, centreY: y } = rose;
  return <path d={`M${x - 5} ${y} h10 M${x} ${y - 5} v10`} stroke="var(--sk-ink3)" strokeWidth="1" />;
}
