import { ContactCurves } from '../drawing/curves/contact-curves.js';
import { RefundSteps } from '../drawing/curves/refund-steps.js';
import { SmallHump } from '../drawing/curves/small-hump.js';
import { at, fly, look, maskAt, NOW, TARNWICK_MASK } from './invented.js';

const pass = { highestMs: at(14, 6, 20), highestDeg: 66, azimuthAtHighestDeg: 282, northbound: true };
const { aosMs, losMs, profile } = fly(pass, TARNWICK_MASK);
const fromMs = at(13, 59);
const toMs = at(14, 14);
const steps = Array.from({ length: 181 }, (_, index) => fromMs + (index / 180) * (toMs - fromMs));
const seen = steps.map((ms) => look(pass, ms));
const inContact = (ms: number, value: number) => (ms < aosMs || ms > losMs ? Number.NaN : value);
const elevation = Float32Array.from(seen.map((one) => (one.elevationDeg < 0 ? Number.NaN : one.elevationDeg)));
const land = Float32Array.from(
  seen.map((one) => (one.elevationDeg < 0 ? Number.NaN : maskAt(TARNWICK_MASK, one.azimuthDeg))),
);
const doppler = Float32Array.from(steps.map((ms) => inContact(ms, -50 * Math.tanh((ms - pass.highestMs) / 110_000))));
const margin = Float32Array.from(
  steps.map((ms, index) => inContact(ms, 2 + 14 * Math.sin(((seen[index]?.elevationDeg ?? 0) / 90) * 1.7))),
);

export default function PlateCurves() {
  return (
    <div style={{ maxWidth: 690 }}>
      <ContactCurves
        label="Whimbrel 5 at Tarnwick East"
        {...{ fromMs, toMs, aosMs, losMs, nowMs: NOW }}
        phases={[
          { kind: 'guard', label: 'Set-up', fromMs: aosMs - 120_000, toMs: aosMs },
          { kind: 'contact', label: 'Contact', fromMs: aosMs, toMs: losMs },
          { kind: 'guard', label: 'Tear-down', fromMs: losMs, toMs: losMs + 90_000 },
        ]}
        panels={[
          {
            id: 'el',
            title: 'Elevation',
            note: 'degrees, over the antenna’s own horizon',
            unit: '°',
            values: elevation,
            land,
            filled: true,
            minValue: 0,
            heightPx: 160,
            reading: '39.5° now, 65.8° at 14:06:30',
          },
          {
            id: 'dop',
            title: 'Doppler',
            note: 'kHz at 2214.0 MHz down',
            unit: 'kHz',
            values: doppler,
            reading: '+36.7 kHz now, set receiver to 2214.0367 MHz',
          },
          {
            id: 'm',
            title: 'Link margin',
            note: 'dB left over, downlink',
            unit: 'dB',
            values: margin,
            minValue: 0,
            floor: { value: 2, text: 'below 2 dB, frames may be lost' },
            reading: '13.4 dB now, least 3.0 dB',
          },
        ]}
      />
      <div style={{ display: 'flex', gap: 24, margin: '16px 0' }}>
        <SmallHump profile={profile} aosMs={aosMs} losMs={losMs} />
        <SmallHump profile={profile} aosMs={aosMs} losMs={losMs} look="berth" nowMs={NOW} />
        <SmallHump profile={profile} aosMs={aosMs} losMs={losMs} look="asked" />
        <div style={{ width: 290 }}>
          <RefundSteps
            steps={[
              { percent: 100, untilText: 'till 24 h' },
              { percent: 60, untilText: 'till 4 h' },
              { percent: 25, untilText: 'till 14:30:05', isNow: true },
              { percent: 0, untilText: 'after that' },
            ]}
          />
        </div>
      </div>
    </div>
  );
}
