/** Go to: any page, spacecraft, station, account or booking by a few letters, from the keyboard. Loaded when first asked for. */
import '@mantine/spotlight/styles.css';
import { Spotlight, type SpotlightActionData, type SpotlightActionGroupData } from '@mantine/spotlight';
import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { bookingQueries } from '../lib/booking-queries.js';
import { paths } from '../lib/paths.js';
import { useCan, useSession } from '../lib/session.js';
import { spacecraftQueries } from '../lib/spacecraft-queries.js';
import { stationQueries } from '../lib/station-queries.js';
import { TERMS } from '../ui/terms.js';
import { goToStore } from './go-to-store.js';
import { pagesFor } from './navigation.js';

const MOST_SHOWN = 12;

export function GoTo() {
  const [words, setWords] = useState('');
  const groups = useDestinations(words);
  return (
    <Spotlight
      store={goToStore}
      shortcut={null}
      query={words}
      onQueryChange={setWords}
      actions={groups}
      limit={MOST_SHOWN}
      nothingFound="Nothing here has that name."
      searchProps={{
        placeholder: 'A page, a spacecraft, a station, or the number of a booking',
        'aria-label': 'Go to',
      }}
      highlightQuery
      overlayProps={{ blur: 0, backgroundOpacity: 0.5 }}
      scrollable
      maxHeight="60dvh"
    />
  );
}

/** Where the person may go, in groups; only what their role can read is asked for. */
function useDestinations(words: string): SpotlightActionGroupData[] {
  const navigate = useNavigate();
  const may = useCan();
  const { active } = useSession();
  const { data: craft } = useQuery({ ...spacecraftQueries.list(), enabled: may('spacecraft.read') });
  const { data: stations } = useQuery({ ...stationQueries.list({ pageSize: 200 }), enabled: may('stations.read') });
  const number = /^\d{1,9}$/.test(words.trim()) ? Number(words.trim()) : null;
  const { data: found } = useQuery({
    ...bookingQueries.list({ number: number ?? 0, pageSize: 1 }),
    enabled: number !== null && may('bookings.read'),
  });
  const to = (id: string, label: string, path: string, description?: string): SpotlightActionData => ({
    id,
    label,
    ...(description ? { description } : {}),
    onClick: () => navigate(path),
  });
  const pages = [
    ...pagesFor(active).map((page) => to(page.to, page.label, page.to)),
    to(paths.organisation, 'Organisation and members', paths.organisation),
    to(paths.help, 'Help', paths.help, 'Step by step, and the words of the trade'),
  ];
  const bookings = number === null ? [] : (found?.items ?? []);
  const groups: SpotlightActionGroupData[] = [
    {
      group: 'Bookings',
      actions: bookings.map((one) => ({
        ...to(one.id, `Booking ${one.number}`, paths.booking(one.id), `${one.spacecraftName} over ${one.antennaName}`),
        keywords: [String(one.number)],
      })),
    },
    { group: 'Pages', actions: pages },
    {
      group: 'Spacecraft',
      actions: (craft?.items ?? []).map((one) => to(one.id, one.name, paths.oneSpacecraft(one.id))),
    },
    {
      group: 'Stations',
      actions: (stations?.items ?? []).map((one) => to(one.id, one.name, paths.station(one.id), one.country)),
    },
    {
      group: 'Words of the trade',
      actions:
        words.trim() === ''
          ? []
          : Object.values(TERMS).map((term) =>
              to(`word ${term.word}`, term.word, `${paths.help}?word=${encodeURIComponent(term.word)}`, term.meaning),
            ),
    },
  ];
  return groups.filter(({ actions }) => actions.length > 0);
}
