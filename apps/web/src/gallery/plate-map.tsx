import { lazy, Suspense, useState } from 'react';
import { NOW } from './invented.js';

const WorldMap = lazy(() => import('../drawing/world-map/world-map.js'));
const stations = [
  { id: 'h', name: 'Hollenvik', latitudeDeg: 69.3, longitudeDeg: 16.1, footprintDeg: 18 },
  { id: 't', name: 'Tarnwick', latitudeDeg: 54.5, longitudeDeg: -2.6, footprintDeg: 18 },
  { id: 'p', name: 'Pico Verdal', latitudeDeg: 38.5, longitudeDeg: -28.3, footprintDeg: 18 },
  { id: 'd', name: 'Droëvlei', latitudeDeg: -33.9, longitudeDeg: 19.5, footprintDeg: 18, kind: 'other' as const },
  { id: 'c', name: 'Punta Cormorán', latitudeDeg: -54.4, longitudeDeg: -68.2, footprintDeg: 18 },
];
const points = Array.from({ length: 140 }, (_, index) => {
  const atMs = NOW + (index - 50) * 60_000;
  const along = (index / 96) * 2 * Math.PI;
  return {
    atMs,
    latitudeDeg: 82 * Math.sin(along),
    longitudeDeg:
      (((((Math.atan2(Math.sin(along) * 0.13, Math.cos(along)) * 180) / Math.PI - index * 0.25 + 40 + 180) % 360) +
        360) %
        360) -
      180,
  };
});

export default function PlateMap() {
  const [picked, setPicked] = useState<string | null>('t');
  return (
    <Suspense fallback={null}>
      <WorldMap
        label="Stations"
        nowMs={NOW}
        stations={stations}
        tracks={[{ id: 'w', name: 'Whimbrel 4', short: 'W4', points }]}
        pickedStationId={picked}
        onPickStation={setPicked}
      />
    </Suspense>
  );
}
