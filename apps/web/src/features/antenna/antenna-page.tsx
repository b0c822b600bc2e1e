import { Anchor, Skeleton, Tabs } from '@mantine/core';
import { useQuery } from '@tanstack/react-query';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import { paths } from '../../lib/paths.js';
import { sentenceOf } from '../../lib/problem-fields.js';
import { useCan } from '../../lib/session.js';
import { stationQueries } from '../../lib/station-queries.js';
import { useTitle } from '../../lib/use-title.js';
import { formatNumber } from '../../ui/format.js';
import { PageTitle } from '../../ui/page-title.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { AntennaBadge } from '../../ui/station-badges.js';
import classes from './antenna.module.css';
import { MOUNT_WORDS } from './antenna-values.js';
import { BandsTab } from './bands-tab.js';
import { HoursTab } from './hours-tab.js';
import { MaskTab } from './mask-tab.js';
import { OverviewTab } from './overview-tab.js';
import { PricesTab } from './prices-tab.js';
import { SaleControl } from './sale-control.js';
import type { TabProps } from './tab-props.js';

const TABS = [
  { value: 'overview', label: 'Overview and limits' },
  { value: 'mask', label: 'Mask' },
  { value: 'bands', label: 'Bands' },
  { value: 'prices', label: 'Prices' },
  { value: 'hours', label: 'Availability' },
] as const;

export function AntennaPage() {
  const { id = '' } = useParams();
  const antenna = useQuery(stationQueries.antenna(id));
  const station = useQuery({
    ...stationQueries.one(antenna.data?.stationId ?? ''),
    enabled: antenna.data !== undefined,
  });
  useTitle(antenna.data?.name ?? 'Antenna');
  const error = antenna.error ?? station.error;
  if (error)
    return (
      <ProblemNotice
        title="The antenna could not be read"
        onRetry={() => void (antenna.error ? antenna : station).refetch()}
      >
        {sentenceOf(error)}
      </ProblemNotice>
    );
  if (!antenna.data || !station.data) return <Skeleton height={480} />;
  return <OneAntenna key={id} antenna={antenna.data} station={station.data} />;
}

function OneAntenna({ antenna, station }: Omit<TabProps, 'mayWrite'>) {
  const mayWrite = useCan()('stations.write');
  const [search, setSearch] = useSearchParams();
  const tab = TABS.find((one) => one.value === search.get('tab'))?.value ?? 'overview';
  const props: TabProps = { antenna, station, mayWrite };
  return (
    <>
      <PageTitle
        title={antenna.name}
        badge={<AntennaBadge state={antenna.state} />}
        actions={mayWrite && <SaleControl antenna={antenna} />}
      >
        {formatNumber(antenna.diameterM, 1)}&nbsp;m, {MOUNT_WORDS[antenna.mount]}, turns{' '}
        {formatNumber(antenna.slewAzimuthDegPerS, 1)}° a second, at{' '}
        <Anchor component={Link} to={paths.station(station.id)}>
          {station.name}
        </Anchor>
        .
      </PageTitle>
      <Tabs
        value={tab}
        onChange={(next) => setSearch(next && next !== 'overview' ? { tab: next } : {})}
        keepMounted={false}
        className={classes.tabs}
      >
        <Tabs.List aria-label={`About ${antenna.name}`}>
          {TABS.map((one) => (
            <Tabs.Tab key={one.value} value={one.value}>
              {one.label}
            </Tabs.Tab>
          ))}
        </Tabs.List>
        <Tabs.Panel value="overview">
          <OverviewTab {...props} />
        </Tabs.Panel>
        <Tabs.Panel value="mask">
          <MaskTab {...props} />
        </Tabs.Panel>
        <Tabs.Panel value="bands">
          <BandsTab {...props} />
        </Tabs.Panel>
        <Tabs.Panel value="prices">
          <PricesTab {...props} />
        </Tabs.Panel>
        <Tabs.Panel value="hours">
          <HoursTab {...props} />
        </Tabs.Panel>
      </Tabs>
    </>
  );
}
