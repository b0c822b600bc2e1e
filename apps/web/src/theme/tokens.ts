/**
 * Every colour of the product, once per scheme. Screens and drawings read them as CSS variables: `deep` is `--sk-deep`.
 * Contrast is checked in `tokens.spec.ts`; `brass` and `shoal` are too pale in the light scheme to mean anything alone.
 */

/** The colours of one scheme. */
export interface Tokens {
  readonly paper: string;
  readonly sheet: string;
  readonly night: string;
  readonly sea: string;
  readonly shoalWash: string;
  readonly brassWash: string;
  readonly buoyWash: string;
  readonly kelpWash: string;
  readonly land: string;
  readonly landLine: string;
  readonly ink: string;
  readonly ink2: string;
  readonly ink3: string;
  readonly deep: string;
  readonly brassInk: string;
  readonly buoyInk: string;
  readonly kelpInk: string;
  readonly edge: string;
  readonly brass: string;
  readonly buoy: string;
  readonly kelp: string;
  readonly shoal: string;
  readonly line: string;
  readonly weave: string;
  readonly slant: string;
  readonly foot: string;
  readonly slate: string;
  readonly slateFoot: string;
  readonly berthInk: string;
  readonly button: string;
  readonly buttonHover: string;
  readonly buttonInk: string;
  readonly plateInk: string;
  readonly tray: string;
  readonly trayInk: string;
  readonly trayInk2: string;
  readonly trayBrass: string;
  readonly trayEdge: string;
}

/** Paper and ink, for day. */
export const LIGHT: Tokens = {
  paper: '#F5F2EA',
  sheet: '#FCFAF4',
  night: '#DFE2E0',
  sea: '#EEF3EF',
  shoalWash: '#D3E6E0',
  brassWash: '#F4E8CF',
  buoyWash: '#F7E0D8',
  kelpWash: '#E0EBD8',
  land: '#D3C9AF',
  landLine: '#756C4C',
  ink: '#14303A',
  ink2: '#3F5963',
  ink3: '#4E636B',
  deep: '#0E5A6B',
  brassInk: '#74500F',
  buoyInk: '#A03019',
  kelpInk: '#3A622F',
  edge: '#7E7D69',
  brass: '#B9862F',
  buoy: '#C8452D',
  kelp: '#4C7A3F',
  shoal: '#7FB5AE',
  line: '#DAD5C6',
  weave: '#B9B29C',
  slant: '#8D9A9B',
  foot: '#14303A',
  slate: '#4A6169',
  slateFoot: '#6E8085',
  berthInk: '#FCFAF4',
  button: '#0E5A6B',
  buttonHover: '#0B4A58',
  buttonInk: '#FCFAF4',
  plateInk: '#10262E',
  tray: '#14303A',
  trayInk: '#F5F2EA',
  trayInk2: '#C5CDC9',
  trayBrass: '#D2A04A',
  trayEdge: '#8FA3A8',
};

/** Night watch, for a dim room: nothing large is bright. */
export const DARK: Tokens = {
  paper: '#0B171C',
  sheet: '#11222A',
  night: '#060E12',
  sea: '#0E2027',
  shoalWash: '#173A40',
  brassWash: '#2E2716',
  buoyWash: '#341B17',
  kelpWash: '#182A1A',
  land: '#3A3A2E',
  landLine: '#8D8562',
  ink: '#DAD4C4',
  ink2: '#A9B5B3',
  ink3: '#92A1A0',
  deep: '#68B4C1',
  brassInk: '#DDB064',
  buoyInk: '#EC8B75',
  kelpInk: '#97C188',
  edge: '#658389',
  brass: '#D2A04A',
  buoy: '#E0745C',
  kelp: '#86B277',
  shoal: '#3F7F7C',
  line: '#22383F',
  weave: '#3A4540',
  slant: '#566669',
  foot: '#7F8F90',
  slate: '#93A2A1',
  slateFoot: '#66777A',
  berthInk: '#0B171C',
  button: '#1D6271',
  buttonHover: '#247485',
  buttonInk: '#F5F2EA',
  plateInk: '#0B171C',
  tray: '#17303A',
  trayInk: '#DAD4C4',
  trayInk2: '#A9B5B3',
  trayBrass: '#D2A04A',
  trayEdge: '#7C9298',
};

/** `shoalWash` to `--sk-shoal-wash`, `ink2` to `--sk-ink2`. */
export function cssName(token: keyof Tokens): string {
  return `--sk-${token.replace(/[A-Z]/g, (letter) => `-${letter.toLowerCase()}`)}`;
}

/** All tokens of a scheme as CSS variables. */
export function cssVariables(tokens: Tokens): Record<string, string> {
  const names = Object.keys(tokens) as (keyof Tokens)[];
  return Object.fromEntries(names.map((name) => [cssName(name), tokens[name]]));
}
