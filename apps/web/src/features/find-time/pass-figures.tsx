import type { PassDetail } from '@skyberth/shared';
import { useMemo } from 'react';
import { SkyPlot } from '../../drawing/sky-plot/sky-plot.js';
import { DayTime } from '../../ui/day-time.js';
import { formatBytes, formatDegrees, formatDuration, formatNumber } from '../../ui/format.js';
import { isNearSun, sunText } from '../../ui/sun-text.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './find-time.module.css';
import { ageWords, dopplerWords, followedMs, gapWords, marginOf, spanWords } from './pass-words.js';

const BITS_PER_BYTE = 8;

/** The sky plot with the three instants of the pass beside it. */
export function SkyAndTimes({ detail }: { readonly detail: PassDetail }) {
  const [aosMs, losMs] = [Date.parse(detail.aosUtc), Date.parse(detail.losUtc)];
  const [aosAzimuthDeg, , losAzimuthDeg] = detail.geometry.azimuthDeg;
  const plot = useMemo(
    () => ({
      mask: detail.antenna.mask.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg })),
      track: detail.track.map((one) => ({ ...one, atMs: Date.parse(one.timeUtc) })),
    }),
    [detail],
  );
  const zone = detail.antenna.timeZone;
  return (
    <div className={classes.sky}>
      <SkyPlot
        label={`${detail.spacecraft.name} over ${detail.antenna.name}`}
        {...plot}
        aosMs={aosMs}
        losMs={losMs}
        sun={detail.sun}
        size="small"
      />
      <Figures columns={1}>
        <Figure
          label={`AOS, azimuth ${formatDegrees(aosAzimuthDeg)}`}
          value={<DayTime atMs={aosMs} show="time" placeTimeZone={zone} />}
        />
        <Figure
          label={`Highest, ${formatDegrees(detail.geometry.maxElevationDeg)}`}
          value={<DayTime atMs={Date.parse(detail.geometry.tcaUtc)} show="time" placeTimeZone={zone} />}
        />
        <Figure
          label={`LOS, azimuth ${formatDegrees(losAzimuthDeg)}`}
          value={<DayTime atMs={losMs} show="time" placeTimeZone={zone} />}
        />
        <Figure label="Length" value={formatDuration(losMs - aosMs)} />
      </Figures>
    </div>
  );
}

/** Range, link, volume, light and how far to trust the times. */
export function PassFigures({ detail }: { readonly detail: PassDetail }) {
  const { links } = detail;
  const range = spanWords(detail.track.map((one) => one.rangeKm));
  return (
    <section className={classes.part} aria-label="Figures of the pass">
      <Figures columns={2}>
        {range && <Figure label="Range" value={range} unit="km" />}
        <Figure label="Spacecraft" value={detail.illumination} />
        <SourceFigure detail={detail} />
        {detail.mountGaps.length > 0 && (
          <Figure label="Mount follows" value={formatDuration(followedMs(detail))} note={gapWords(detail)} />
        )}
        <Figure
          label="Sun, at its closest"
          value={sunText(detail.sun)}
          tone={isNearSun(detail.sun) ? 'bad' : 'plain'}
        />
        {links.map((link) => (
          <LinkFigures key={`${link.radioName} ${link.direction}`} link={link} named={links.length > 1} />
        ))}
      </Figures>
      <LinkBudgets links={links} />
    </section>
  );
}

/** What the pass was computed from, how old that is, and how well AOS and LOS are known by it. */
function SourceFigure({ detail }: { readonly detail: PassDetail }) {
  const { source, ephemeris, elements } = detail;
  if (elements.timingErrorS === null)
    return <Figure label="Computed from" value="Own ephemeris" note={ephemeris?.source} />;
  const name = source === 'both' ? 'Ephemeris and element set' : 'Element set';
  return (
    <Figure
      label={`${name}, ${ageWords(elements.ageH)}`}
      value={`±${formatNumber(elements.timingErrorS, 1)}`}
      unit="s"
      tone={elements.freshness === 'stale' ? 'bad' : 'plain'}
      {...(elements.freshness === 'fresh' ? {} : { note: elements.freshness })}
    />
  );
}

function LinkFigures({ link, named }: { readonly link: PassDetail['links'][number]; readonly named: boolean }) {
  const margin = marginOf(link);
  const doppler = dopplerWords(link.dopplerHz);
  const words = (text: string) => (named ? `${link.radioName}: ${text}` : text);
  return (
    <>
      {margin && <Figure label={words(`Margin, ${link.band} ${link.direction}`)} value={margin} unit="dB" />}
      {doppler && (
        <Figure label={words(`Doppler at ${formatNumber(link.frequencyMhz, 1)} MHz`)} value={doppler} unit="kHz" />
      )}
      {link.volumeBits !== null && (
        <Figure label={words('Data volume, about')} value={formatBytes(link.volumeBits / BITS_PER_BYTE)} />
      )}
    </>
  );
}

/** How the margin at the highest point is made up, line by line with its source. */
function LinkBudgets({ links }: Pick<PassDetail, 'links'>) {
  const budgets = links.filter((link) => link.budgetAtHighest.length > 0);
  if (budgets.length === 0) return null;
  return budgets.map((link) => (
    <details key={`${link.radioName} ${link.direction}`} className={classes.budget}>
      <summary>
        How the {link.band} {link.direction} margin at the highest point comes about
      </summary>
      <table className={classes.sum}>
        <tbody>
          {link.budgetAtHighest.map((line) => (
            <tr key={line.label}>
              <th scope="row">
                {line.label} <small>{line.source}</small>
              </th>
              <td>{formatNumber(line.valueDb, 1)} dB</td>
            </tr>
          ))}
        </tbody>
      </table>
      {link.note && <p className={classes.small}>{link.note}</p>}
    </details>
  ));
}
