/** The filter as a sentence, whose underlined parts are the controls. */
import type { Spacecraft } from '@skyberth/shared';
import { useQuery } from '@tanstack/react-query';
import { FilterPart, FilterSentence } from '../../ui/filter-sentence.js';
import { formatMoney } from '../../ui/format.js';
import { ManyControl, NeedControl, NumberControl, PeriodControl } from './filter-controls.js';
import { lengthWords, needWords, periodWords, priceWords, spacecraftWords, stationWords } from './filter-words.js';
import { findTimeQueries } from './find-time-queries.js';
import type { SearchFilter } from './search-filter.js';

interface SearchSentenceProps {
  readonly filter: SearchFilter;
  readonly spacecraft: readonly Spacecraft[];
  /** The one currency of what is offered, where there is one. */
  readonly currency: string | null;
  readonly onChange: (part: Partial<SearchFilter>) => void;
}

const MAJOR = 100;

export function SearchSentence({ filter, spacecraft, currency, onChange }: SearchSentenceProps) {
  const period = periodWords(filter.period);
  return (
    <FilterSentence>
      Passes of{' '}
      <FilterPart name="Spacecraft" value={spacecraftWords(filter.spacecraftIds, spacecraft)}>
        <ManyControl
          label="Spacecraft"
          allLabel="All of them"
          items={spacecraft}
          chosen={filter.spacecraftIds}
          onChange={(spacecraftIds) => onChange({ spacecraftIds })}
        />
      </FilterPart>{' '}
      for{' '}
      <FilterPart name="What is needed" value={needWords(filter)}>
        <NeedControl filter={filter} onChange={onChange} />
      </FilterPart>{' '}
      {period.lead}{' '}
      <FilterPart name="Period" value={period.value} widthPx={320}>
        {(close) => (
          <PeriodControl
            period={filter.period}
            onChange={(next) => {
              onChange({ period: next });
              close();
            }}
          />
        )}
      </FilterPart>{' '}
      at <StationsPart filter={filter} onChange={onChange} />, <LimitParts {...{ filter, currency, onChange }} />.
    </FilterSentence>
  );
}

function StationsPart({ filter, onChange }: Pick<SearchSentenceProps, 'filter' | 'onChange'>) {
  const { data } = useQuery(findTimeQueries.stations());
  const stations = data?.items ?? [];
  return (
    <FilterPart name="Stations" value={stationWords(filter.stationIds, stations)}>
      <ManyControl
        label="Stations"
        allLabel="Any station"
        items={stations.map((one) => ({
          id: one.id,
          name: one.name,
          note: `${one.country}, ${one.antennas} ${one.antennas === 1 ? 'antenna' : 'antennas'}`,
        }))}
        chosen={filter.stationIds}
        onChange={(stationIds) => onChange({ stationIds })}
      />
    </FilterPart>
  );
}

const ELEVATIONS = [0, 5, 10, 20, 30].map((value) => ({ value, label: `${value}°` }));
const LENGTHS = [0, 3, 5, 8].map((value) => ({ value, label: value === 0 ? 'any' : `${value} min` }));

function LimitParts({ filter, currency, onChange }: Omit<SearchSentenceProps, 'spacecraft'>) {
  const prices = [null, 50, 80, 120].map((value) => ({
    value,
    label: value === null ? 'any' : currency ? formatMoney({ amountMinor: value * MAJOR, currency }, true) : `${value}`,
  }));
  return (
    <>
      rising above{' '}
      <FilterPart name="Lowest elevation of the highest point" value={`${filter.lowestElevationDeg}°`}>
        {(close) => (
          <NumberControl
            label="Elevation"
            unit="degrees"
            value={filter.lowestElevationDeg}
            presets={ELEVATIONS}
            most={90}
            decimals={1}
            onChange={(value) => {
              onChange({ lowestElevationDeg: value ?? 0 });
              close();
            }}
          />
        )}
      </FilterPart>{' '}
      for{' '}
      <FilterPart name="Shortest length" value={lengthWords(filter.shortestS)}>
        {(close) => (
          <NumberControl
            label="Length"
            unit="minutes"
            value={filter.shortestS / 60}
            presets={LENGTHS}
            most={1440}
            decimals={2}
            onChange={(value) => {
              onChange({ shortestS: Math.round((value ?? 0) * 60) });
              close();
            }}
          />
        )}
      </FilterPart>
      , {filter.highestPriceMinor === null ? 'at' : 'up to'}{' '}
      <FilterPart name="Highest price of a contact" value={priceWords(filter.highestPriceMinor, currency)}>
        {(close) => (
          <NumberControl
            label="Price before VAT"
            unit={currency ?? 'in the station’s currency'}
            value={filter.highestPriceMinor === null ? null : filter.highestPriceMinor / MAJOR}
            presets={prices}
            most={99_999_999}
            decimals={2}
            onChange={(value) => {
              onChange({ highestPriceMinor: value === null ? null : Math.round(value * MAJOR) });
              close();
            }}
          />
        )}
      </FilterPart>
      {filter.highestPriceMinor !== null && ' each'}
    </>
  );
}
