import { Anchor, Paper } from '@mantine/core';
import { routes } from '@skyberth/shared';
import { Link } from 'react-router-dom';
import { call } from '../../lib/api-client.js';
import { paths } from '../../lib/paths.js';
import { formatMoney, formatNumber } from '../../ui/format.js';
import { Sign } from '../../ui/signs.js';
import { Figure, Figures } from '../../ui/values.js';
import classes from './antenna.module.css';
import { AntennaForm, type AntennaInputValues } from './antenna-form.js';
import { antennaValues } from './antenna-values.js';
import { openHoursAWeek } from './hours-words.js';
import { pointsOf, skyAbovePercent } from './mask-draft.js';
import type { TabProps } from './tab-props.js';
import { useAntennaChange } from './use-antenna-change.js';

export function OverviewTab({ antenna, station, mayWrite }: TabProps) {
  const save = useAntennaChange(
    (input: AntennaInputValues) => call(routes.updateAntenna, { params: { id: antenna.id }, body: input }),
    'Saved. Passes are computed with it from now on; sold contacts keep their times.',
  );
  return (
    <div className={classes.columns}>
      <AntennaForm
        key={antenna.version}
        initial={antennaValues(antenna)}
        submitLabel="Save size, limits and rules"
        onSave={save.mutateAsync}
        readOnly={!mayWrite}
      />
      <div className={classes.stack}>
        <StillNeeded antenna={antenna} stationId={station.id} />
        <Paper component="section" withBorder className={classes.card} aria-label="In short">
          <h2 className={classes.cardTitle}>In short</h2>
          <Figures columns={2}>
            <Figure
              label="Sky above the mask"
              value={formatNumber(skyAbovePercent(pointsOf(antenna.mask)), 1)}
              unit="%"
            />
            <Figure label="Open in a week" value={formatNumber(openHoursAWeek(antenna.availability), 1)} unit="h" />
            <Figure
              label="Bands"
              value={antenna.bands.length}
              note={antenna.bands.map((band) => band.band).join(', ')}
            />
            <Figure
              label="A minute"
              value={
                antenna.price
                  ? formatMoney({ amountMinor: antenna.price.perMinuteMinor, currency: antenna.price.currency })
                  : 'no price'
              }
            />
          </Figures>
        </Paper>
      </div>
    </div>
  );
}

/** Where each missing thing is given, by the words the API uses for it. */
const PLACES: readonly { readonly about: RegExp; readonly tab: string; readonly word: string }[] = [
  { about: /mask/i, tab: 'mask', word: 'Mask' },
  { about: /band/i, tab: 'bands', word: 'Bands' },
  { about: /price/i, tab: 'prices', word: 'Prices' },
  { about: /open/i, tab: 'hours', word: 'Availability' },
];

function StillNeeded({ antenna, stationId }: { readonly antenna: TabProps['antenna']; readonly stationId: string }) {
  return (
    <Paper component="section" withBorder className={classes.card} aria-labelledby="needed-title">
      <h2 id="needed-title" className={classes.cardTitle}>
        {antenna.missing.length === 0 ? 'Nothing is missing' : 'What it still needs'}
      </h2>
      {antenna.missing.length === 0 ? (
        <p className={classes.good}>
          <Sign shape="check" /> {antenna.state === 'on sale' ? 'It is on sale.' : 'It can be put on sale.'}
        </p>
      ) : (
        <ul className={classes.needed}>
          {antenna.missing.map((sentence) => {
            const place = PLACES.find((one) => one.about.test(sentence));
            return (
              <li key={sentence}>
                <Sign shape="dashed" />
                <span>
                  {sentence}{' '}
                  <Anchor
                    component={Link}
                    to={place ? paths.antennaTab(antenna.id, place.tab) : paths.station(stationId)}
                    aria-label={`Go to ${place ? place.word : 'the station'}: ${sentence}`}
                  >
                    {place ? place.word : 'The station'}
                  </Anchor>
                </span>
              </li>
            );
          })}
        </ul>
      )}
    </Paper>
  );
}
