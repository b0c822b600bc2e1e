import { SkyPlot } from '../drawing/sky-plot/sky-plot.js';
import { at, fly, NOW, TARNWICK_MASK, trackOf } from './invented.js';

const pass = { highestMs: at(14, 6, 20), highestDeg: 66, azimuthAtHighestDeg: 282, northbound: true };
const { aosMs, losMs } = fly(pass, TARNWICK_MASK);
const common = { mask: TARNWICK_MASK, track: trackOf(pass, aosMs, losMs), aosMs, losMs };
const sun = { azimuthDeg: 208, elevationDeg: 6, keepOffDeg: 5 };

export default function PlateSky() {
  return (
    <div style={{ display: 'flex', gap: 24, flexWrap: 'wrap' }}>
      <div style={{ width: 400, maxWidth: '100%' }}>
        <SkyPlot label="Whimbrel 5 at Tarnwick East" {...common} nowMs={NOW} sun={sun} />
      </div>
      <div style={{ width: 400, maxWidth: '100%' }}>
        <SkyPlot
          label="Whimbrel 5 at Tarnwick East, done"
          {...common}
          sun={{ ...sun, elevationDeg: 30, azimuthDeg: 120 }}
        />
      </div>
      <div style={{ width: 160 }}>
        <SkyPlot label="Whimbrel 5, small" {...common} size="small" />
      </div>
    </div>
  );
}
