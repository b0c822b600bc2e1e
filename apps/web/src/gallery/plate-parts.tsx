import {
  Button,
  Checkbox,
  NumberInput,
  Radio,
  SegmentedControl,
  Select,
  Switch,
  Table,
  Tabs,
  TextInput,
} from '@mantine/core';
import { Caution } from '../ui/caution.js';
import { DayTime } from '../ui/day-time.js';
import { EmptyState } from '../ui/empty-state.js';
import { HoldTray, TrayButton } from '../ui/hold-tray.js';
import { PageTitle } from '../ui/page-title.js';
import { ProblemNotice } from '../ui/problem-notice.js';
import { StateBadge } from '../ui/state-badge.js';
import { Duration, Figure, Figures, MoneyText } from '../ui/values.js';
import { NOW } from './invented.js';

const clock = () => NOW;

export default function PlateParts() {
  return (
    <div style={{ display: 'grid', gap: 20 }}>
      <PageTitle
        title="Payout run 48, second half of November"
        badge={<StateBadge tone="look">In dispute</StateBadge>}
        actions={<Button variant="default">Export CSV</Button>}
      >
        Settled from 2026-320 to 2026-334, eight owners, all in euro. Made at{' '}
        <DayTime atMs={NOW} placeTimeZone="Europe/London" />.
      </PageTitle>
      <div style={{ display: 'flex', gap: 8, flexWrap: 'wrap' }}>
        {(['active', 'good', 'look', 'bad', 'waiting', 'quiet'] as const).map((tone) => (
          <StateBadge key={tone} tone={tone}>
            {tone}
          </StateBadge>
        ))}
      </div>
      <div style={{ display: 'flex', gap: 10, flexWrap: 'wrap', alignItems: 'center' }}>
        <Button>Hold for 10 minutes</Button>
        <Button size="md">Publish this mask</Button>
        <Button variant="default">Keep as a draft</Button>
        <Button variant="outline" color="buoy">
          Keep West still
        </Button>
        <Button disabled>Send report</Button>
        <SegmentedControl aria-label="View" data={['Board', 'Calendar', 'Table', 'Map']} />
      </div>
      <Tabs defaultValue="b">
        <Tabs.List>
          <Tabs.Tab value="a">Overview</Tabs.Tab>
          <Tabs.Tab value="b">Mask, bands and prices</Tabs.Tab>
          <Tabs.Tab value="c">History</Tabs.Tab>
        </Tabs.List>
      </Tabs>
      <div style={{ display: 'grid', gridTemplateColumns: 'repeat(auto-fit, minmax(200px, 1fr))', gap: 16 }}>
        <TextInput label="Name" description="As buyers will read it" defaultValue="Tarnwick West" />
        <NumberInput label="Diameter, m" defaultValue={5.4} />
        <Select label="Mount" data={['azimuth over elevation', 'X-Y']} defaultValue="X-Y" />
        <TextInput label="Lowest elevation, °" defaultValue="95" error="Elevation lies from 0° to 90°." />
        <div>
          <Checkbox label="Whole passes only" defaultChecked />
          <Radio label="At once" defaultChecked mt={8} />
          <Switch label="Night watch" mt={8} />
        </div>
      </div>
      <Figures columns={3} ruled>
        <Figure label="Azimuth" value="355.5°" size="large" />
        <Figure label="Range" value="875" unit="km" size="large" />
        <Figure label="Length" value={<Duration ms={582_000} />} size="large" />
      </Figures>
      <Table>
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Owner</Table.Th>
            <Table.Th ta="right">Settled, €</Table.Th>
            <Table.Th ta="right">Adjusted</Table.Th>
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          <Table.Tr>
            <Table.Td>Brattholm Radio</Table.Td>
            <Table.Td ta="right">
              <MoneyText amountMinor={1482340} currency="EUR" />
            </Table.Td>
            <Table.Td ta="right">
              <MoneyText amountMinor={0} currency="EUR" quietZero />
            </Table.Td>
          </Table.Tr>
        </Table.Tbody>
      </Table>
      <div
        style={{
          display: 'grid',
          gridTemplateColumns: 'repeat(auto-fit, minmax(280px, 1fr))',
          gap: 16,
          alignItems: 'start',
        }}
      >
        <Caution title="You may transmit until 14:08">
          <p>
            Clearance C-218: 2025 to 2110 MHz, at most 46 dBW, ends 2027-090. Anything outside it is unlawful and can
            harm other users.
          </p>
          <p>
            Uplink power is a hazard to people near the beam. The licence, local rules and the station’s interlock come
            first; Skyberth replaces none of them.
          </p>
        </Caution>
        <ProblemNotice
          title="The element sets weren’t saved"
          items={[{ where: 'Line 3', message: 'the checksum is 4; it should be 7.' }]}
          onRetry={() => undefined}
        >
          Correct the lines below, or keep the good ones only.
        </ProblemNotice>
        <EmptyState title="No spacecraft yet" action={<Button>Add a spacecraft</Button>}>
          Paste an element set and Skyberth finds its passes.
        </EmptyState>
      </div>
      <HoldTray
        title="Whimbrel 1 over Pico Verdal"
        detail="14:36:20 to 14:45:40, 9 min 20 s"
        endsMs={NOW + 462_000}
        clock={clock}
        price="€87.92"
        priceNote="price frozen, not yet charged"
      >
        <TrayButton>Let it go</TrayButton>
        <TrayButton main>Pay and confirm</TrayButton>
      </HoldTray>
    </div>
  );
}
