/** The points of a mask as a table: for the keyboard, for exact figures, and to read what changed. */
import { NumberInput, Paper } from '@mantine/core';
import { type ReactNode, useEffect, useRef } from 'react';
import { maskElevationAt } from '../../drawing/common/rose.js';
import type { EditableMaskPoint } from '../../drawing/mask-editor/mask-editor-types.js';
import { isChanged, movePoint } from '../../drawing/mask-editor/mask-points.js';
import { formatDegrees, formatNumber } from '../../ui/format.js';
import classes from './mask-tab.module.css';

interface MaskTableProps {
  readonly points: readonly EditableMaskPoint[];
  /** The mask in force; empty where there is none. */
  readonly before: readonly EditableMaskPoint[];
  readonly pickedId: string | null;
  readonly onPick: (id: string | null) => void;
  readonly onChange: (points: readonly EditableMaskPoint[], settled: boolean) => void;
  readonly readOnly: boolean;
  readonly children: ReactNode;
}

export function MaskTable(props: MaskTableProps) {
  const { points, before, pickedId, onPick, onChange, readOnly } = props;
  const changed = before.length === 0 ? 0 : points.filter((point) => isChanged(point, before)).length;
  return (
    <Paper component="section" withBorder className={classes.points} aria-labelledby="points-title">
      <header className={classes.pointsHead}>
        <h2 id="points-title" className={classes.title}>
          Points
        </h2>
        <span className={classes.small}>
          {points.length}
          {changed > 0 && `, ${changed} changed`}
        </span>
      </header>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a box that scrolls must be reachable by keyboard */}
      <section className={classes.rows} tabIndex={0} aria-label="Points of the mask">
        <table>
          <thead>
            <tr>
              <th scope="col">Azimuth</th>
              <th scope="col">Elevation</th>
              <th scope="col">
                <span className="sk-hidden">In force</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {points.map((point) => (
              <PointRow
                key={point.id}
                point={point}
                wasDeg={
                  before.length > 0 && isChanged(point, before) ? maskElevationAt(before, point.azimuthDeg) : null
                }
                isPicked={point.id === pickedId}
                readOnly={readOnly}
                onPick={() => onPick(point.id)}
                onMove={(to) => onChange(movePoint(points, point.id, { ...point, ...to }), true)}
              />
            ))}
          </tbody>
        </table>
      </section>
      <p className={classes.small}>Straight between points, joined across north.</p>
      <div className={classes.acts}>{props.children}</div>
    </Paper>
  );
}

interface PointRowProps {
  readonly point: EditableMaskPoint;
  readonly wasDeg: number | null;
  readonly isPicked: boolean;
  readonly readOnly: boolean;
  readonly onPick: () => void;
  readonly onMove: (to: { azimuthDeg?: number; elevationDeg?: number }) => void;
}

function PointRow({ point, wasDeg, isPicked, readOnly, onPick, onMove }: PointRowProps) {
  const row = useRef<HTMLTableRowElement>(null);
  useEffect(() => {
    if (isPicked) row.current?.scrollIntoView({ block: 'nearest' });
  }, [isPicked]);
  const was = <td className={classes.was}>{wasDeg === null ? '' : `was ${formatDegrees(wasDeg)}`}</td>;
  if (isPicked && !readOnly)
    return (
      <tr ref={row} data-picked>
        <td>
          <AngleInput label="Azimuth" value={point.azimuthDeg} onSet={(azimuthDeg) => onMove({ azimuthDeg })} />
        </td>
        <td>
          <AngleInput label="Elevation" value={point.elevationDeg} onSet={(elevationDeg) => onMove({ elevationDeg })} />
        </td>
        {was}
      </tr>
    );
  return (
    <tr ref={row} data-changed={wasDeg !== null || undefined}>
      <td>
        {readOnly ? (
          formatNumber(point.azimuthDeg, 1)
        ) : (
          <button
            type="button"
            onClick={onPick}
            aria-label={`Change the point at ${formatDegrees(point.azimuthDeg)}, elevation ${formatDegrees(point.elevationDeg)}`}
          >
            {formatNumber(point.azimuthDeg, 1)}
          </button>
        )}
      </td>
      <td>{formatNumber(point.elevationDeg, 1)}</td>
      {was}
    </tr>
  );
}

interface AngleInputProps {
  readonly label: string;
  readonly value: number;
  readonly onSet: (angleDeg: number) => void;
}

/** Typed freely and taken when left or entered, so that half a number never moves the mask. */
function AngleInput({ label, value, onSet }: AngleInputProps) {
  const set = (text: string) => {
    const angleDeg = Number.parseFloat(text.replace('\u2212', '-').replace(',', '.'));
    if (Number.isFinite(angleDeg) && angleDeg !== value) onSet(angleDeg);
  };
  return (
    <NumberInput
      key={value}
      aria-label={`${label} in degrees`}
      defaultValue={value}
      decimalScale={1}
      fixedDecimalScale
      w={76}
      classNames={{ input: classes.angle ?? '' }}
      onBlur={(event) => set(event.currentTarget.value)}
      onKeyDown={(event) => event.key === 'Enter' && set(event.currentTarget.value)}
    />
  );
}
