/** Element sets as text again. Both forms read back to the very same values, or are refused. */
import { OrbitError } from '../orbit-error.js';
import { formatAlpha5, MOST_TLE_NUMBER } from './alpha5.js';
import type { ElementSet } from './element-set.js';
import { tleEpochText } from './epoch.js';
import { tleChecksum } from './tle-columns.js';

/** One message as KVN, every number with the shortest digits that read back as the same one. */
export function toOmmKvn(set: ElementSet, head: { readonly creationUtc: string; readonly originator: string }): string {
  const number = (value: number) => String(value).replace('e', 'E');
  const rows: readonly (readonly [string, string])[] = [
    ['CCSDS_OMM_VERS', '2.0'],
    ['CREATION_DATE', head.creationUtc.replace(/Z$/, '')],
    ['ORIGINATOR', head.originator],
    ['OBJECT_NAME', set.objectName || 'UNNAMED'],
    ['OBJECT_ID', set.objectId || 'UNKNOWN'],
    ['CENTER_NAME', 'EARTH'],
    ['REF_FRAME', 'TEME'],
    ['TIME_SYSTEM', 'UTC'],
    ['MEAN_ELEMENT_THEORY', 'SGP4'],
    ['EPOCH', set.epochUtc.replace(/Z$/, '')],
    ['MEAN_MOTION', number(set.meanMotionRevPerDay)],
    ['ECCENTRICITY', number(set.eccentricity)],
    ['INCLINATION', number(set.inclinationDeg)],
    ['RA_OF_ASC_NODE', number(set.raanDeg)],
    ['ARG_OF_PERICENTER', number(set.argPerigeeDeg)],
    ['MEAN_ANOMALY', number(set.meanAnomalyDeg)],
    ['EPHEMERIS_TYPE', '0'],
    ['CLASSIFICATION_TYPE', set.classification],
    ['NORAD_CAT_ID', String(set.catalogNumber)],
    ['ELEMENT_SET_NO', String(set.elementSetNumber)],
    ['REV_AT_EPOCH', String(set.revolutionAtEpoch)],
    ['BSTAR', number(set.bstarPerEarthRadius)],
    ['MEAN_MOTION_DOT', number(set.meanMotionDot)],
    ['MEAN_MOTION_DDOT', number(set.meanMotionDdot)],
  ];
  return `${rows.map(([keyword, value]) => `${keyword} = ${value}`).join('\n')}\n`;
}

/**
 * The two lines of a set. Lines that were read are given back as they were.
 * @throws OrbitError `not expressible`, naming the value, where the columns of a TLE cannot hold it exactly.
 */
export function toTle(set: ElementSet): readonly [line1: string, line2: string] {
  if (set.tle) return set.tle;
  const number = formatAlpha5(set.catalogNumber);
  if (number === undefined) throw inexpressible('catalogue number', set.catalogNumber, `at most ${MOST_TLE_NUMBER}`);
  const epoch = tleEpochText(set.epochUtc);
  if (epoch === undefined)
    throw inexpressible('epoch', set.epochUtc, 'a whole number of 864 microseconds, 1957 to 2056');
  const line1 = [
    `1 ${number}${set.classification}`,
    designatorColumns(set.objectId),
    epoch,
    rateColumns(set.meanMotionDot),
    powerColumns('second derivative of mean motion', set.meanMotionDdot),
    powerColumns('BSTAR', set.bstarPerEarthRadius),
    `0 ${fixed('element set number', set.elementSetNumber, 0, 4)}`,
  ].join(' ');
  const eccentricity = fixed('eccentricity', set.eccentricity, 7, 9).slice(2);
  const line2 = [
    `2 ${number}`,
    fixed('inclination', set.inclinationDeg, 4, 8),
    angleColumns('right ascension of the node', set.raanDeg),
    eccentricity,
    angleColumns('argument of perigee', set.argPerigeeDeg),
    angleColumns('mean anomaly', set.meanAnomalyDeg),
    `${fixed('mean motion', set.meanMotionRevPerDay, 8, 11)}${fixed('revolution number', set.revolutionAtEpoch, 0, 5)}`,
  ].join(' ');
  return [`${line1}${tleChecksum(line1)}`, `${line2}${tleChecksum(line2)}`];
}

function fixed(field: string, value: number, decimals: number, width: number): string {
  const text = value.toFixed(decimals);
  if (Number(text) !== value || text.length > width) {
    throw inexpressible(field, value, `${decimals} decimals in ${width} columns`);
  }
  return text.padStart(width, ' ');
}

/** An OMM may count angles from -180; the columns of a TLE count from 0. A whole turn changes no orbit. */
function angleColumns(field: string, angleDeg: number): string {
  if (angleDeg >= 0) return fixed(field, angleDeg, 4, 8);
  throw inexpressible(field, angleDeg, 'an angle from 0 to 360 degrees');
}

function rateColumns(value: number): string {
  const text = Math.abs(value).toFixed(8);
  if (Number(text) !== Math.abs(value) || Math.abs(value) >= 1) {
    throw inexpressible('first derivative of mean motion', value, 'eight decimals below 1');
  }
  return `${value < 0 ? '-' : ' '}${text.slice(1)}`;
}

/** Five digits after an unwritten decimal point, and a power of ten from -9 to 9. */
function powerColumns(field: string, value: number): string {
  if (value === 0) return ' 00000+0';
  const [digits = '', exponentText = ''] = Math.abs(value).toExponential(4).split('e');
  const exponent = Number(exponentText) + 1;
  const mantissa = digits.replace('.', '');
  if (Number(`.${mantissa}e${exponent}`) !== Math.abs(value) || Math.abs(exponent) > 9) {
    throw inexpressible(field, value, 'five digits and a power of ten from -9 to 9');
  }
  return `${value < 0 ? '-' : ' '}${mantissa}${exponent < 0 ? '-' : '+'}${Math.abs(exponent)}`;
}

function designatorColumns(objectId: string): string {
  if (objectId === '') return ' '.repeat(8);
  const parts = /^(19[5-9]\d|20[0-5]\d)-(\d{3})([A-Z]{1,3})$/.exec(objectId);
  if (!parts) throw inexpressible('international designator', objectId, 'a form such as 1998-067A');
  return `${parts[1]?.slice(2)}${parts[2]}${parts[3]}`.padEnd(8, ' ');
}

function inexpressible(field: string, found: number | string, expected: string): OrbitError {
  return new OrbitError('not expressible', `A TLE cannot hold the ${field} ${found}; it takes ${expected}.`, {
    field,
    found,
  });
}
