import { useMemo, useState } from 'react';
import WorldMap from '../../drawing/world-map/world-map.js';
import { useNow } from '../../lib/use-now.js';
import classes from './find-time.module.css';
import { passRows, reachDeg } from './pass-rows.js';
import { PassTable } from './results-table.js';
import type { ResultsProps } from './search-results.js';

/** Where the stations are and how far their passes reach; default export so that it loads only when asked for. */
export default function ResultsMap({ result, filter, onChange }: ResultsProps) {
  const nowMs = useNow(60_000);
  const [stationId, setStationId] = useState<string | null>(null);
  const rows = useMemo(() => passRows(result), [result]);
  const stations = useMemo(
    () =>
      result.stations.map((station) => {
        const antennaIds = station.antennas.map((one) => one.id);
        const footprintDeg = reachDeg(result.passes, antennaIds);
        const offers = result.passes.some((one) => antennaIds.includes(one.antennaId) && one.parts.length > 0);
        const { id, name, latitudeDeg, longitudeDeg } = station;
        return {
          ...{ id, name, latitudeDeg, longitudeDeg },
          kind: offers ? ('offered' as const) : ('other' as const),
          ...(footprintDeg === null ? {} : { footprintDeg }),
        };
      }),
    [result],
  );
  const station = result.stations.find((one) => one.id === stationId);
  const here = rows.filter((row) => station?.antennas.some((one) => one.id === row.pass.antennaId));
  return (
    <>
      <WorldMap
        label="Stations of this search"
        nowMs={nowMs}
        stations={stations}
        pickedStationId={stationId}
        onPickStation={setStationId}
      />
      <p className={classes.small}>
        A filled mark has something for sale. The ring is as far off as a pass of this search is seen from there; the
        shade is night.
      </p>
      {station ? (
        <>
          <h3 className={classes.day}>
            {station.name}, {station.ownerName}
          </h3>
          <PassTable rows={here} pickedKey={filter.passKey} onPick={(passKey) => onChange({ passKey, part: null })} />
        </>
      ) : (
        <p>Pick a station to list its passes.</p>
      )}
    </>
  );
}
