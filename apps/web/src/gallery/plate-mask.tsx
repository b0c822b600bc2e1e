import { useState } from 'react';
import { MaskEditor } from '../drawing/mask-editor/mask-editor.js';
import type { EditableMaskPoint } from '../drawing/mask-editor/mask-editor-types.js';
import { TARNWICK_MASK } from './invented.js';

const before: EditableMaskPoint[] = TARNWICK_MASK.map((point, index) => ({ id: `p${index}`, ...point }));
const raised = new Map([
  [194, 16],
  [212, 23.5],
  [230, 17.5],
]);
const after = before.map((point) => ({
  ...point,
  elevationDeg:
    raised.get(point.azimuthDeg) ?? (point.azimuthDeg === 90 ? 46 : point.azimuthDeg === 84 ? 44 : point.elevationDeg),
}));

export default function PlateMask() {
  const [points, setPoints] = useState<readonly EditableMaskPoint[]>(after);
  const [picked, setPicked] = useState<string | null>('p13');
  const minutes = Array.from({ length: 36 }, (_, index) => {
    const base = 60 + 25 * Math.cos((index / 18) * Math.PI) - (index === 8 || index === 9 ? 30 : 0);
    return {
      fromAzimuthDeg: index * 10,
      minutesBefore: base,
      minutesNow: index > 18 && index < 25 ? base - 3 - (index % 3) * 4 : base,
    };
  });
  return (
    <div style={{ width: 480, maxWidth: '100%' }}>
      <MaskEditor
        label="Horizon mask of Tarnwick West"
        points={points}
        before={before}
        pickedId={picked}
        onPick={setPicked}
        onChange={setPoints}
        minutes={minutes}
        notes={[{ azimuthDeg: 84, elevationDeg: 44, text: 'water tower' }]}
      />
    </div>
  );
}
