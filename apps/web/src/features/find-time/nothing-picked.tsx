import type { FoundPass, SearchResult } from '@skyberth/shared';
import { SmallHump } from '../../drawing/curves/small-hump.js';
import { useNow } from '../../lib/use-now.js';
import { formatDegrees, formatDuration } from '../../ui/format.js';
import { MoneyText } from '../../ui/values.js';
import { humpProfile, nextForSale } from './board-model.js';
import classes from './find-time.module.css';
import { nearTime } from './pass-words.js';

const HOW_MANY = 4;

/** The card before a pass is picked: the next few that can be had. */
export function NothingPicked({ result, onPick }: { result: SearchResult; onPick: (key: string) => void }) {
  const nowMs = useNow(10_000);
  const next = nextForSale(result.passes, nowMs, HOW_MANY);
  return (
    <>
      <h2 className={classes.cardTitle}>{next.length > 0 ? 'Next for sale' : 'Nothing for sale here'}</h2>
      <p className={classes.cardLead}>
        {next.length > 0
          ? 'Pick a pass on the left, or one of these, for its sky, its link and its price.'
          : 'Pick a dotted pass to read why. A longer period, a lower elevation or more stations may help.'}
      </p>
      <ul className={classes.next}>
        {next.map((pass) => (
          <li key={pass.key}>
            <button type="button" onClick={() => onPick(pass.key)}>
              <NextPass pass={pass} result={result} nowMs={nowMs} />
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}

function NextPass({ pass, result, nowMs }: { pass: FoundPass; result: SearchResult; nowMs: number }) {
  const [aosMs, losMs] = [Date.parse(pass.geometry.aosUtc), Date.parse(pass.geometry.losUtc)];
  const antenna = result.stations.flatMap((one) => one.antennas).find((one) => one.id === pass.antennaId);
  const [part] = pass.parts;
  return (
    <>
      <SmallHump profile={humpProfile(pass)} aosMs={aosMs} losMs={losMs} widthPx={72} heightPx={34} />
      <span>
        <strong>{nearTime(aosMs, nowMs)}</strong> {result.spacecraft.find((one) => one.id === pass.spacecraftId)?.name}
        <br />
        <span className={classes.small}>
          {antenna?.name}, {formatDuration(losMs - aosMs)}, {formatDegrees(pass.geometry.maxElevationDeg)}
        </span>
      </span>
      {part && pass.currency && (
        <strong>
          <MoneyText amountMinor={part.totalMinor} currency={pass.currency} whole />
        </strong>
      )}
    </>
  );
}
