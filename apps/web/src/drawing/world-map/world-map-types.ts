/** What the map is fed with: WGS84 degrees and UTC milliseconds. */

export interface MapStation {
  readonly id: string;
  readonly name: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  /** Radius of the visibility footprint as an angle at the Earth's centre, in degrees. */
  readonly footprintDeg?: number;
  /** `offered` is filled, `other` is outlined. */
  readonly kind?: 'offered' | 'other';
}

/** A ground track: points in time order; a jump across the date line is handled. */
export interface MapTrack {
  readonly id: string;
  readonly name: string;
  readonly short: string;
  readonly points: readonly { readonly atMs: number; readonly latitudeDeg: number; readonly longitudeDeg: number }[];
}

/** Props of `WorldMap`. */
export interface WorldMapProps {
  readonly label: string;
  readonly nowMs: number;
  readonly stations: readonly MapStation[];
  readonly tracks?: readonly MapTrack[];
  readonly pickedStationId?: string | null;
  readonly onPickStation?: (id: string) => void;
}
