import { useState } from 'react';
import { TideBoard } from '../drawing/tide-board/tide-board.js';
import { crowd, NOW } from './invented.js';

const made = crowd();
const span = Number(new URLSearchParams(location.search).get('hours') ?? '6') * 3_600_000;

export default function PlateCrowd() {
  const [view, setView] = useState({ fromMs: NOW, toMs: NOW + span });
  const [picked, setPicked] = useState<string[]>([]);
  return (
    <TideBoard
      label="Two hundred antennas"
      {...made}
      nowMs={NOW + 60_000}
      view={view}
      onViewChange={setView}
      limits={{ fromMs: NOW - 86_400_000, toMs: NOW + 15 * 86_400_000 }}
      pickedIds={picked}
      onPick={(id) => setPicked([id])}
      onOpen={() => undefined}
    />
  );
}
