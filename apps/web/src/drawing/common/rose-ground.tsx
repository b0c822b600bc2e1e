import { useId } from 'react';
import { atDistance, type Direction, maskOutline, pathThrough, type Rose, sectorPath, toPoint } from './rose.js';

/** Degrees of the shallows inside the shore: three lines of fading water. Decoration. */
const SHALLOWS_DEG = [5, 9];
const RIM_PIECE_DEG = 10;

/** Rim with dark and light tens of degrees, the letters of the compass and, when large, degrees between them. */
export function RoseRim({ rose, isLarge }: { readonly rose: Rose; readonly isLarge: boolean }) {
  const rimPx = isLarge ? 5 : 4;
  const pieces = Array.from({ length: 36 }, (_, index) => index * RIM_PIECE_DEG);
  return (
    <g>
      <circle
        cx={rose.centreX}
        cy={rose.centreY}
        r={rose.radiusPx + rimPx / 2}
        fill="none"
        stroke="var(--sk-sheet)"
        strokeWidth={rimPx}
      />
      {pieces
        .filter((_, index) => index % 2 === 0)
        .map((fromDeg) => (
          <path
            key={fromDeg}
            fill="var(--sk-ink)"
            d={sectorPath(rose, fromDeg, fromDeg + RIM_PIECE_DEG, rose.radiusPx, rose.radiusPx + rimPx)}
          />
        ))}
      {[rose.radiusPx, rose.radiusPx + rimPx].map((radius) => (
        <circle
          key={radius}
          cx={rose.centreX}
          cy={rose.centreY}
          r={radius}
          fill="none"
          stroke="var(--sk-ink)"
          strokeWidth="1"
        />
      ))}
      <RimWords rose={rose} isLarge={isLarge} rimPx={rimPx} />
    </g>
  );
}

function RimWords({ rose, isLarge, rimPx }: { rose: Rose; isLarge: boolean; rimPx: number }) {
  const letters = (['N', 'E', 'S', 'W'] as const).map((text, index) => ({
    text,
    azimuthDeg: index * 90,
    isLetter: true,
  }));
  const degrees = isLarge
    ? [30, 60, 120, 150, 210, 240, 300, 330].map((azimuthDeg) => ({
        text: `${azimuthDeg}°`,
        azimuthDeg,
        isLetter: false,
      }))
    : [];
  return [...letters, ...degrees].map(({ text, azimuthDeg, isLetter }) => {
    const { x, y } = atDistance(rose, azimuthDeg, rose.radiusPx + rimPx + (isLetter ? 9 : 14));
    return (
      <text
        key={text}
        x={x}
        y={y}
        textAnchor="middle"
        dominantBaseline="central"
        fontSize={isLetter ? 13 : 12}
        fontWeight={isLetter ? 800 : 500}
        fill={isLetter ? 'var(--sk-ink)' : 'var(--sk-ink2)'}
      >
        {text}
      </text>
    );
  });
}

/** Sea inside, the mask as shore with its shallows, and rings at 30 and 60 degrees. */
export function RoseWater({
  rose,
  mask,
  isLarge,
}: {
  readonly rose: Rose;
  readonly mask: readonly Direction[];
  readonly isLarge: boolean;
}) {
  const clipId = useId();
  const shore = pathThrough(maskOutline(rose, mask), true);
  return (
    <g>
      <clipPath id={clipId}>
        <path d={shore} />
      </clipPath>
      <circle cx={rose.centreX} cy={rose.centreY} r={rose.radiusPx} fill="var(--sk-land)" />
      <path d={shore} fill="var(--sk-sea)" />
      <g clipPath={`url(#${clipId})`}>
        <path d={shore} fill="none" stroke="var(--sk-shoal-wash)" strokeWidth={isLarge ? 16 : 8} />
        {SHALLOWS_DEG.map((raisedDeg) => (
          <path
            key={raisedDeg}
            d={pathThrough(maskOutline(rose, mask, raisedDeg), true)}
            fill="none"
            stroke="var(--sk-line)"
            strokeWidth="0.8"
          />
        ))}
      </g>
      {[30, 60].map((elevationDeg) => (
        <circle
          key={elevationDeg}
          cx={rose.centreX}
          cy={rose.centreY}
          r={rose.radiusPx * (1 - elevationDeg / 90)}
          fill="none"
          stroke="var(--sk-ink3)"
          strokeWidth="0.9"
          strokeDasharray="1.2 3.4"
        />
      ))}
      <path
        d={`M${rose.centreX} ${rose.centreY - rose.radiusPx} v${2 * rose.radiusPx} M${rose.centreX - rose.radiusPx} ${rose.centreY} h${2 * rose.radiusPx}`}
        stroke="var(--sk-line)"
        strokeWidth="1"
      />
      <path d={shore} fill="none" stroke="var(--sk-land-line)" strokeWidth={isLarge ? 1.3 : 1} />
      {isLarge && <RingWords rose={rose} />}
    </g>
  );
}

function RingWords({ rose }: { readonly rose: Rose }) {
  return [30, 60].map((elevationDeg) => {
    const { x, y } = toPoint(rose, 174, elevationDeg);
    return (
      <text key={elevationDeg} x={x + 4} y={y - 6} fontSize="12" fill="var(--sk-ink2)">
        {elevationDeg}°
      </text>
    );
  });
}
