/**
 * Contrast of two opaque colours, 1 to 21.
 * Source: WCAG 2.2, definitions of "relative luminance" and "contrast ratio".
 */
export function contrastRatio(a: string, b: string): number {
  const [high, low] = [relativeLuminance(a), relativeLuminance(b)].sort((x, y) => y - x) as [number, number];
  return (high + 0.05) / (low + 0.05);
}

/** Relative luminance of `#RRGGBB`, 0 to 1. Throws on anything else. */
export function relativeLuminance(hex: string): number {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(hex);
  if (!match) throw new Error(`Not a colour of the form #RRGGBB: ${hex}`);
  const [red, green, blue] = match.slice(1).map((pair) => linear(Number.parseInt(pair, 16) / 255)) as [
    number,
    number,
    number,
  ];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function linear(channel: number): number {
  return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
}
