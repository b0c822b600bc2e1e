/** What the sky plot is fed with: degrees and UTC milliseconds. */

/** A point of an antenna's horizon: straight between points by azimuth, joined across north. */
export interface MaskPoint {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

/** Where the spacecraft is seen at one instant. */
export interface TrackPoint {
  readonly atMs: number;
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

/** The Sun during the contact, and how far a dish keeps off it. */
export interface SunPlace {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly keepOffDeg: number;
}

/** Props of `SkyPlot`. */
export interface SkyPlotProps {
  /** Names the drawing: `Whimbrel 4 over Hollenvik 1`. A description with the figures is added by itself. */
  readonly label: string;
  readonly mask: readonly MaskPoint[];
  /** Ascending in time; a step of 10 s or less draws smoothly. */
  readonly track: readonly TrackPoint[];
  readonly aosMs: number;
  readonly losMs: number;
  /** With it, the track behind is a wake, the one ahead is dashed and the vessel stands between. */
  readonly nowMs?: number;
  readonly sun?: SunPlace;
  /** `small` (about 150 px) drops degrees and minute labels. Default `large`. */
  readonly size?: 'small' | 'large';
}
