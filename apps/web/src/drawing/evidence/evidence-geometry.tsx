/** Elevation over the mask and link margin of a contact, with time running down; the gap is one band across. */
import { useId } from 'react';
import { formatDegrees, formatHourMinute, formatTime } from '../../ui/format.js';
import { minuteLabels, scaleOf, yOf } from './evidence-scale.js';

export interface EvidencePoint {
  readonly atMs: number;
  readonly elevationDeg: number;
  readonly maskDeg: number;
  readonly marginDb: number | null;
}

export interface EvidenceGeometryProps {
  readonly aosMs: number;
  readonly losMs: number;
  readonly track: readonly EvidencePoint[];
  readonly gap: { readonly fromMs: number; readonly toMs: number } | null;
  readonly heightPx: number;
  readonly label: string;
}

const WIDTH = 440;
const HEAD = 26;
const LEFT = 64;
const ELEVATION_END = 300;
const MARGIN_START = 326;

export function EvidenceGeometry({ aosMs, losMs, track, gap, heightPx, label }: EvidenceGeometryProps) {
  const titleId = useId();
  const scale = scaleOf(aosMs, losMs, heightPx);
  const y = (atMs: number) => HEAD + yOf(scale, atMs);
  const highest = Math.max(20, ...track.map(({ elevationDeg }) => elevationDeg));
  const topDeg = highest > 60 ? 90 : highest > 40 ? 60 : highest > 20 ? 45 : 30;
  const x = (deg: number) => LEFT + (Math.max(0, deg) / topDeg) * (ELEVATION_END - LEFT);
  const margins = track.flatMap(({ atMs, marginDb }) => (marginDb === null ? [] : [{ atMs, marginDb }]));
  const mostDb = Math.max(6, ...margins.map(({ marginDb }) => marginDb));
  const leastDb = Math.min(0, ...margins.map(({ marginDb }) => marginDb));
  const mx = (db: number) => MARGIN_START + ((db - leastDb) / (mostDb - leastDb)) * (WIDTH - 12 - MARGIN_START);
  const line = (points: readonly (readonly [number, number])[]) =>
    points.map(([px, py], index) => `${index ? 'L' : 'M'}${px.toFixed(1)} ${py.toFixed(1)}`).join('');
  const elevation = track.map(({ atMs, elevationDeg }) => [x(elevationDeg), y(atMs)] as const);
  const mask = track.map(({ atMs, maskDeg }) => [x(maskDeg), y(atMs)] as const);
  const first = track[0];
  const last = track.at(-1);
  const ticksDeg = [0, topDeg / 3, (2 * topDeg) / 3, topDeg];
  return (
    <svg
      viewBox={`0 0 ${WIDTH} ${HEAD + heightPx + 4}`}
      style={{ display: 'block', width: WIDTH, maxWidth: '100%', height: 'auto' }}
      role="img"
      aria-labelledby={titleId}
    >
      <title id={titleId}>{label}</title>
      {ticksDeg.map((deg) => (
        <g key={deg}>
          <path d={`M${x(deg)} ${HEAD} V${HEAD + heightPx}`} stroke="var(--sk-line)" />
          <text x={x(deg)} y={14} textAnchor="middle" fontSize="11" fill="var(--sk-ink2)">
            {formatDegrees(deg, 0)}
          </text>
        </g>
      ))}
      {minuteLabels(scale).map((at) => (
        <g key={at}>
          <path d={`M${LEFT} ${y(at)} H${WIDTH - 8}`} stroke="var(--sk-line)" />
          <text
            x={LEFT - 10}
            y={y(at)}
            textAnchor="end"
            dominantBaseline="central"
            fontSize="12"
            fontWeight="600"
            fill="var(--sk-ink)"
          >
            {formatHourMinute(at)}
          </text>
        </g>
      ))}
      {gap && (
        <>
          <rect
            x={LEFT}
            y={y(gap.fromMs)}
            width={WIDTH - 8 - LEFT}
            height={Math.max(1, y(gap.toMs) - y(gap.fromMs))}
            fill="var(--sk-buoy-wash)"
          />
          {[gap.fromMs, gap.toMs].map((at) => (
            <path
              key={at}
              d={`M${LEFT} ${y(at)} H${WIDTH - 8}`}
              stroke="var(--sk-buoy)"
              strokeWidth="1.5"
              strokeDasharray="5 3"
            />
          ))}
        </>
      )}
      {first && last && (
        <>
          <path
            d={`${line(elevation)} L${x(0)} ${y(last.atMs)} L${x(0)} ${y(first.atMs)} Z`}
            fill="var(--sk-shoal)"
            fillOpacity="0.3"
          />
          <path
            d={`${line(mask)} L${x(0)} ${y(last.atMs)} L${x(0)} ${y(first.atMs)} Z`}
            fill="var(--sk-land)"
            stroke="var(--sk-land-line)"
          />
          <path d={line(elevation)} fill="none" stroke="var(--sk-deep)" strokeWidth="2.2" />
        </>
      )}
      <path d={`M${MARGIN_START - 13} ${HEAD} V${HEAD + heightPx}`} stroke="var(--sk-ink)" strokeWidth="1.5" />
      <path d={`M${LEFT} ${HEAD} V${HEAD + heightPx}`} stroke="var(--sk-ink)" strokeWidth="1.5" />
      {margins.length > 0 && (
        <>
          {[0, mostDb / 2, mostDb].map((db) => (
            <text key={db} x={mx(db)} y={14} textAnchor="middle" fontSize="11" fill="var(--sk-ink2)">
              {Math.round(db)}
              {db === mostDb ? ' dB' : ''}
            </text>
          ))}
          <path
            d={line(margins.map(({ atMs, marginDb }) => [mx(marginDb), y(atMs)] as const))}
            fill="none"
            stroke="var(--sk-deep)"
            strokeWidth="2"
          />
        </>
      )}
      {margins.length === 0 && (
        <text x={(MARGIN_START + WIDTH) / 2} y={HEAD + 20} textAnchor="middle" fontSize="11" fill="var(--sk-ink2)">
          margin unknown
        </text>
      )}
      <desc>
        From {formatTime(aosMs)} to {formatTime(losMs)}
        {gap ? `, without data from ${formatTime(gap.fromMs)} to ${formatTime(gap.toMs)}` : ''}.
      </desc>
    </svg>
  );
}
