import { describe, expect, it } from 'vitest';
import { contrastRatio } from './contrast.js';
import { cssName, cssVariables, DARK, LIGHT, type Tokens } from './tokens.js';

/** WCAG 2.2, success criterion 1.4.3 (text) and 1.4.11 (shapes that carry meaning). */
const TEXT_RATIO = 4.5;
const SHAPE_RATIO = 3;

const TEXTS: (keyof Tokens)[] = ['ink', 'ink2', 'ink3', 'deep', 'brassInk', 'buoyInk', 'kelpInk'];
const GROUNDS: (keyof Tokens)[] = ['paper', 'sheet', 'night', 'sea'];
const PAIRS: [keyof Tokens, keyof Tokens][] = [
  ['buttonInk', 'button'],
  ['buttonInk', 'buttonHover'],
  ['berthInk', 'deep'],
  ['berthInk', 'slate'],
  ['plateInk', 'brass'],
  ['plateInk', 'trayBrass'],
  ['trayInk', 'tray'],
  ['trayInk2', 'tray'],
  ['trayBrass', 'tray'],
  ['brassInk', 'brassWash'],
  ['buoyInk', 'buoyWash'],
  ['kelpInk', 'kelpWash'],
  ['ink', 'land'],
  ['ink2', 'shoalWash'],
  ['ink2', 'brassWash'],
  ['ink2', 'buoyWash'],
];

describe.each([
  ['light', LIGHT],
  ['night watch', DARK],
])('colours of the %s scheme', (_name, tokens) => {
  it('has readable text on every ground (WCAG 2.2, 1.4.3)', () => {
    for (const text of TEXTS) {
      for (const ground of GROUNDS) {
        expect(contrastRatio(tokens[text], tokens[ground]), `${text} on ${ground}`).toBeGreaterThanOrEqual(TEXT_RATIO);
      }
    }
  });

  it('has readable text on its own fills (WCAG 2.2, 1.4.3)', () => {
    for (const [text, ground] of PAIRS) {
      expect(contrastRatio(tokens[text], tokens[ground]), `${text} on ${ground}`).toBeGreaterThanOrEqual(TEXT_RATIO);
    }
  });

  it('has visible edges and shapes (WCAG 2.2, 1.4.11)', () => {
    for (const shape of ['edge', 'buoy', 'kelp', 'landLine'] as const) {
      for (const ground of ['paper', 'sheet', 'night'] as const) {
        expect(contrastRatio(tokens[shape], tokens[ground]), `${shape} on ${ground}`).toBeGreaterThanOrEqual(
          SHAPE_RATIO,
        );
      }
    }
  });
});

describe('names of tokens', () => {
  it('turns a token into a CSS variable', () => {
    expect(cssName('shoalWash')).toBe('--sk-shoal-wash');
    expect(cssName('ink2')).toBe('--sk-ink2');
    expect(cssVariables(LIGHT)['--sk-paper']).toBe('#F5F2EA');
  });

  it('measures black on white as 21 (WCAG 2.2)', () => {
    expect(contrastRatio('#000000', '#FFFFFF')).toBeCloseTo(21, 5);
  });
});
