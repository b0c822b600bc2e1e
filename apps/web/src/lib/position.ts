/** Where a spacecraft stands over an antenna at this instant, worked out on this page from the elements in force. */
import type { ContactOrbit } from '@skyberth/shared';
import { useEffect, useState } from 'react';

export interface Position {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly rangeKm: number;
  readonly rangeRateKmPerS: number;
}

export type PositionAt = (atMs: number) => Position;

/**
 * The function that knows; null until the engine is loaded, and for a pass that comes from an operator's own ephemeris, whose
 * track the server has worked out.
 */
export function usePositionAt(orbit: ContactOrbit | undefined): PositionAt | null {
  const [positionAt, setPositionAt] = useState<PositionAt | null>(null);
  useEffect(() => {
    let isWanted = true;
    setPositionAt(null);
    if (orbit?.omm) {
      const { omm, site } = orbit;
      // The engine is a chunk of its own: only a page with a contact that runs needs it.
      void import('@skyberth/orbit').then(({ lookAngles, parseElementSets, sgp4Source }) => {
        const [set] = parseElementSets(omm).sets;
        if (!isWanted || !set) return;
        const source = sgp4Source(set);
        setPositionAt(() => (atMs: number) => lookAngles(source, site, atMs));
      });
    }
    return () => {
      isWanted = false;
    };
  }, [orbit]);
  return positionAt;
}
