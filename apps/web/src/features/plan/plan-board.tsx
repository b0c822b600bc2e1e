/** A plan on the tide board: each planned contact as its curve, those kept in between posts. */
import type { Plan, PlannedPass } from '@skyberth/shared';
import { useMemo, useState } from 'react';
import { TideBoard } from '../../drawing/tide-board/tide-board.js';
import type { BoardHump, BoardStation, Interval } from '../../drawing/tide-board/tide-board-types.js';
import { useNow } from '../../lib/use-now.js';
import { useIsPhone } from '../../lib/use-phone.js';
import { formatMoney } from '../../ui/format.js';
import { DAY_MS } from './need-values.js';

interface PlanBoardProps {
  readonly need: Plan['need'];
  readonly passes: readonly PlannedPass[];
  readonly keptKeys: readonly string[];
  readonly onToggle: (key: string) => void;
}

export function PlanBoard({ need, passes, keptKeys, onToggle }: PlanBoardProps) {
  const isPhone = useIsPhone();
  const nowMs = useNow();
  const fromMs = Date.parse(`${need.firstDay}T00:00:00Z`);
  const limits = { fromMs, toMs: fromMs + need.days * DAY_MS };
  const [view, setView] = useState<Interval>({ fromMs, toMs: isPhone ? fromMs + DAY_MS / 4 : fromMs + DAY_MS });
  const humps = useMemo(() => passes.flatMap(humpOf), [passes]);
  const stations = useMemo(() => stationsOf(passes), [passes]);
  return (
    <TideBoard
      label={`${humps.length} planned contacts at ${stations.length} stations`}
      stations={stations}
      humps={humps}
      nowMs={nowMs}
      view={view}
      onViewChange={setView}
      limits={limits}
      pickedIds={keptKeys}
      onPick={onToggle}
      onOpen={onToggle}
      variant={isPhone ? 'phone' : 'wide'}
      maxHeightPx={480}
      bare
    />
  );
}

/** Contacts bought before have no curve in a plan; they stand in the table. */
function humpOf(pass: PlannedPass): BoardHump[] {
  if (pass.profile === null) return [];
  const [fromMs, toMs] = [Date.parse(pass.passAosUtc), Date.parse(pass.passLosUtc)];
  const { elevationDeg, maskDeg } = pass.profile;
  const price = { amountMinor: pass.toPayMinor, currency: pass.currency };
  const whole = pass.aosUtc === pass.passAosUtc && pass.losUtc === pass.passLosUtc;
  return [
    {
      id: pass.key,
      rowId: pass.antennaId,
      spacecraftShort: pass.spacecraftShortName,
      spacecraftName: pass.spacecraftName,
      aosMs: fromMs,
      losMs: toMs,
      highestMs: Date.parse(pass.tcaUtc),
      highestDeg: pass.maxElevationDeg,
      profile: {
        fromMs,
        toMs,
        elevationDeg: Float32Array.from(elevationDeg),
        maskDeg: Float32Array.from(elevationDeg, (_, place) => maskDeg[maskDeg.length === 1 ? 0 : place] ?? 0),
      },
      state: 'forSale',
      priceLabel: formatMoney(price, true),
      priceText: formatMoney(price),
      ...(whole ? {} : { part: { fromMs: Date.parse(pass.aosUtc), toMs: Date.parse(pass.losUtc) } }),
    },
  ];
}

function stationsOf(passes: readonly PlannedPass[]): BoardStation[] {
  const stations = new Map<string, { name: string; timeZone: string; rows: Map<string, string> }>();
  for (const pass of passes) {
    if (pass.profile === null) continue;
    const known = stations.get(pass.stationId) ?? {
      name: pass.stationName,
      timeZone: pass.stationTimeZone,
      rows: new Map<string, string>(),
    };
    known.rows.set(pass.antennaId, pass.antennaName);
    stations.set(pass.stationId, known);
  }
  return [...stations]
    .map(([id, { name, timeZone, rows }]) => ({
      id,
      name,
      timeZone,
      nights: [],
      rows: [...rows].map(([rowId, rowName]) => ({ id: rowId, name: rowName, detail: [] })),
    }))
    .sort((a, b) => a.name.localeCompare(b.name));
}
