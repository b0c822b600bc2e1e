import { memo } from 'react';
import { formatLocalTime } from '../../ui/format.js';
import type { RowLayout } from './rows.js';
import classes from './tide-board.module.css';

interface BoardNamesProps {
  readonly layout: RowLayout;
  /** Rows to show: `[first, end)`. */
  readonly range: readonly [number, number];
  readonly nowMs: number;
  readonly variant: 'wide' | 'phone';
}

/** Names of stations and rows at the left; on the phone each row's name lies over its top edge. */
export const BoardNames = memo(function BoardNames({ layout, range, nowMs, variant }: BoardNamesProps) {
  const rows = layout.rows.slice(range[0], range[1]);
  const inSight = new Set(rows.map((row) => row.station.id));
  const stations = variant === 'wide' ? layout.stations.filter(({ station }) => inSight.has(station.id)) : [];
  return (
    <div className={classes.names}>
      {stations.map(({ station, topPx }) => (
        <div key={station.id} className={classes.station} style={{ top: topPx, height: layout.measures.stripPx }}>
          <strong>{station.name}</strong> <span>{formatLocalTime(nowMs, station.timeZone)} there</span>
        </div>
      ))}
      {rows.map(({ row, station, topPx }) => (
        <div key={row.id} className={classes.rowName} style={{ top: topPx, height: layout.measures.rowPx }}>
          {variant === 'phone' ? (
            <div className={classes.phoneName}>
              <strong>{row.name}</strong> {row.detail[0]}, {formatLocalTime(nowMs, station.timeZone)} there
            </div>
          ) : (
            <div className={classes.wideName}>
              <strong title={row.name}>{row.name}</strong>
              {row.detail.slice(0, 2).map((line) => (
                <span key={line}>{line}</span>
              ))}
            </div>
          )}
        </div>
      ))}
    </div>
  );
});
