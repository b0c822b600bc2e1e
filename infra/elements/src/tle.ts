import { epochMsOf, numberOf, type Omm } from './omm.js';

const DAY_MS = 86_400_000;
/** Alpha-5: the letters that stand for 10 to 33; I and O are left out. */
const ALPHA_5 = 'ABCDEFGHJKLMNPQRSTUVWXYZ';
const CATALOG_NUMBER_MAX = 339_999;

/** The three lines of an element set: name and the two lines of the fixed-column format, with their check digits. */
export function tleLines(omm: Omm): [string, string, string] {
  const catalog = catalogNumber(numberOf(omm, 'NORAD_CAT_ID'));
  const line1 = [
    `1 ${catalog}${String(omm.CLASSIFICATION_TYPE ?? 'U').slice(0, 1)}`,
    designator(String(omm.OBJECT_ID ?? '')),
    epochText(omm),
    derivative(numberOf(omm, 'MEAN_MOTION_DOT')),
    exponent(numberOf(omm, 'MEAN_MOTION_DDOT')),
    exponent(numberOf(omm, 'BSTAR')),
    String(omm.EPHEMERIS_TYPE ?? 0).slice(0, 1),
    String(Number(omm.ELEMENT_SET_NO ?? 0) % 10_000).padStart(4),
  ].join(' ');
  const line2 = [
    `2 ${catalog}`,
    angle(omm, 'INCLINATION'),
    angle(omm, 'RA_OF_ASC_NODE'),
    numberOf(omm, 'ECCENTRICITY').toFixed(7).slice(2),
    angle(omm, 'ARG_OF_PERICENTER'),
    angle(omm, 'MEAN_ANOMALY'),
    `${numberOf(omm, 'MEAN_MOTION').toFixed(8).padStart(11)}${String(Number(omm.REV_AT_EPOCH ?? 0) % 100_000).padStart(5)}`,
  ].join(' ');
  return [String(omm.OBJECT_NAME ?? ''), line1 + checkDigit(line1), line2 + checkDigit(line2)];
}

function catalogNumber(value: number): string {
  if (!Number.isInteger(value) || value < 0 || value > CATALOG_NUMBER_MAX) {
    throw new Error(`NORAD_CAT_ID ${value} does not fit into five characters (0 to ${CATALOG_NUMBER_MAX})`);
  }
  if (value < 100_000) return String(value).padStart(5, '0');
  return `${ALPHA_5[Math.floor(value / 10_000) - 10]}${String(value % 10_000).padStart(4, '0')}`;
}

/** "1998-067A" as "98067A  ". */
function designator(objectId: string): string {
  const match = /^\d\d(\d\d)-(\d{3})([A-Z]{1,3})$/.exec(objectId);
  return (match ? `${match[1]}${match[2]}${match[3]}` : '').padEnd(8);
}

/** Two digits of the year and the day of it with eight decimals; microseconds of the text are kept. */
function epochText(omm: Omm): string {
  const epochMs = epochMsOf(omm);
  const below = /\.\d{3}(\d{1,9})/.exec(String(omm.EPOCH))?.[1] ?? '0';
  const year = new Date(epochMs).getUTCFullYear();
  const day = (epochMs - Date.UTC(year, 0, 1) + Number(`0.${below}`)) / DAY_MS + 1;
  return `${String(year % 100).padStart(2, '0')}${day.toFixed(8).padStart(12, '0')}`;
}

function derivative(value: number): string {
  return `${value < 0 ? '-' : ' '}${Math.abs(value).toFixed(8).slice(1)}`;
}

/** Five digits after an unwritten point, and a power of ten: 0.0001027 is " 10270-3". */
function exponent(value: number): string {
  if (value === 0) return ' 00000+0';
  const [digits = '', power = '0'] = Math.abs(value).toExponential(4).split('e');
  const shifted = Number(power) + 1;
  return `${value < 0 ? '-' : ' '}${digits.replace('.', '')}${shifted > 0 ? '+' : '-'}${Math.abs(shifted)}`;
}

function angle(omm: Omm, key: string): string {
  return numberOf(omm, key).toFixed(4).padStart(8);
}

/** Sum of the digits, a minus counting one, modulo ten. */
function checkDigit(line: string): number {
  return [...line].reduce((sum, letter) => sum + (letter === '-' ? 1 : /\d/.test(letter) ? Number(letter) : 0), 0) % 10;
}
