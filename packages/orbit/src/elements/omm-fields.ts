/**
 * The rules for the keywords of an OMM, the same whether they came as KVN, XML, JSON or CSV. Source: CCSDS 502.0-B and the
 * NDM/XML 2.0.0 schema; where SGP4 asks for more than the message's own rules, that is said in the sentence.
 */
import { parseCcsdsTime } from '../ephemeris/ccsds-time.js';
import type { ElementFormat, ElementSet } from './element-set.js';
import { ommEpoch } from './epoch.js';
import { type ElementFaults, plainText } from './faults.js';

/** A keyword's value and the line it stands on. */
export interface OmmField {
  readonly value: string;
  readonly line: number;
}

export interface OmmMessage {
  readonly format: Exclude<ElementFormat, 'tle'>;
  readonly fields: ReadonlyMap<string, OmmField>;
  /** Where the message begins, named when something is missing from it. */
  readonly line: number;
}

/** Units that a value may carry in brackets or as an attribute. */
export const OMM_UNITS: ReadonlyMap<string, string> = new Map([
  ['SEMI_MAJOR_AXIS', 'km'],
  ['MEAN_MOTION', 'rev/day'],
  ['INCLINATION', 'deg'],
  ['RA_OF_ASC_NODE', 'deg'],
  ['ARG_OF_PERICENTER', 'deg'],
  ['MEAN_ANOMALY', 'deg'],
  ['GM', 'km**3/s**2'],
  ['MASS', 'kg'],
  ['SOLAR_RAD_AREA', 'm**2'],
  ['DRAG_AREA', 'm**2'],
  ['BSTAR', '1/ER'],
  ['BTERM', 'm**2/kg'],
  ['MEAN_MOTION_DOT', 'rev/day**2'],
  ['MEAN_MOTION_DDOT', 'rev/day**3'],
  ['AGOM', 'm**2/kg'],
]);

/** Keywords that hold nothing SGP4 needs, and that a correct message may carry. */
const CARRIED = [
  'CLASSIFICATION',
  'MESSAGE_ID',
  'REF_FRAME_EPOCH',
  'SEMI_MAJOR_AXIS',
  'GM',
  'MASS',
  'SOLAR_RAD_AREA',
  'SOLAR_RAD_COEFF',
  'DRAG_AREA',
  'DRAG_COEFF',
  'BTERM',
  'AGOM',
  'COV_REF_FRAME',
];

const READ = [
  'CCSDS_OMM_VERS',
  'CREATION_DATE',
  'ORIGINATOR',
  'OBJECT_NAME',
  'OBJECT_ID',
  'CENTER_NAME',
  'REF_FRAME',
  'TIME_SYSTEM',
  'MEAN_ELEMENT_THEORY',
  'EPOCH',
  'MEAN_MOTION',
  'ECCENTRICITY',
  'INCLINATION',
  'RA_OF_ASC_NODE',
  'ARG_OF_PERICENTER',
  'MEAN_ANOMALY',
  'EPHEMERIS_TYPE',
  'CLASSIFICATION_TYPE',
  'NORAD_CAT_ID',
  'ELEMENT_SET_NO',
  'REV_AT_EPOCH',
  'BSTAR',
  'MEAN_MOTION_DOT',
  'MEAN_MOTION_DDOT',
];

const KEYWORDS = new Set([...READ, ...CARRIED]);

/** Whether a message may hold this keyword at all; covariance entries and user-defined ones are carried unread. */
export function isOmmKeyword(keyword: string): boolean {
  return (
    KEYWORDS.has(keyword) || /^C[XYZ](?:_DOT)?_[XYZ](?:_DOT)?$/.test(keyword) || keyword.startsWith('USER_DEFINED')
  );
}

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;

/** Reads one message's keywords with every fault named. */
class OmmReader {
  constructor(
    private readonly message: OmmMessage,
    private readonly faults: ElementFaults,
  ) {}

  text(keyword: string): string {
    return this.message.fields.get(keyword)?.value ?? '';
  }

  refuse(keyword: string, expected: string, message?: string): void {
    const field = this.message.fields.get(keyword);
    const line = field?.line ?? this.message.line;
    this.faults.add({ line, field: keyword, found: field?.value ?? '', expected, ...(message && { message }) });
  }

  needed(keyword: string): string {
    const value = this.text(keyword);
    if (value === '') {
      const line = this.message.fields.get(keyword)?.line ?? this.message.line;
      const missing = this.message.fields.has(keyword)
        ? `${keyword} is empty`
        : `${keyword} is missing from this message`;
      this.refuse(keyword, 'a value', `Line ${line}: ${missing}.`);
    }
    return value;
  }

  oneOf(keyword: string, allowed: readonly string[], needed: boolean): void {
    const value = needed ? this.needed(keyword) : this.text(keyword);
    if (value === '' || allowed.includes(value.toUpperCase())) return;
    this.refuse(keyword, `${allowed.join(' or ')}, which is what SGP4 needs`);
  }

  number(keyword: string, range: { min: number; max: number; below?: boolean; expected: string }, otherwise?: number) {
    if (otherwise !== undefined && this.text(keyword) === '') return otherwise;
    const text = this.needed(keyword);
    if (text === '') return Number.NaN;
    const value = NUMBER.test(text) ? Number(text) : Number.NaN;
    const inside = value >= range.min && (range.below ? value < range.max : value <= range.max);
    if (!inside) this.refuse(keyword, range.expected);
    return value === 0 ? 0 : value;
  }

  count(keyword: string, highest: number): number {
    const text = this.text(keyword);
    if (text === '') return 0;
    if (!/^\d+$/.test(text) || Number(text) > highest) this.refuse(keyword, `a whole number from 0 to ${highest}`);
    return Number(text);
  }
}

const ANY = { min: -1e6, max: 1e6, expected: 'a number' };
const ANGLE = { min: -180, max: 360, expected: 'an angle from -180 to 360 degrees' };

/** The element set of a message, or undefined with its faults named. */
export function readOmm(message: OmmMessage, faults: ElementFaults): ElementSet | undefined {
  const before = faults.list.length;
  const reader = new OmmReader(message, faults);
  // Catalogues published as JSON or CSV leave out what is the same in every row.
  const whole = message.format === 'omm-kvn' || message.format === 'omm-xml';
  checkHeader(reader, whole);
  const objectName = plainText(reader.needed('OBJECT_NAME'));
  const objectId = plainText(whole ? reader.needed('OBJECT_ID') : reader.text('OBJECT_ID'));
  reader.oneOf('CENTER_NAME', ['EARTH'], whole);
  reader.oneOf('REF_FRAME', ['TEME'], whole);
  reader.oneOf('TIME_SYSTEM', ['UTC'], whole);
  reader.oneOf('MEAN_ELEMENT_THEORY', ['SGP4', 'SGP/SGP4'], whole);
  const epochText = reader.needed('EPOCH');
  const epoch = ommEpoch(epochText);
  if (epochText !== '' && epoch === undefined) reader.refuse('EPOCH', 'a UTC date such as 2026-12-01T06:00:00.000000');
  checkSize(reader);
  const set = {
    format: message.format,
    objectName,
    objectId,
    catalogNumber: reader.count('NORAD_CAT_ID', 999_999_999),
    ...readOrbit(reader),
    ...readTleBlock(reader),
    sourceLine: message.line,
  };
  return epoch === undefined || faults.list.length > before ? undefined : { ...set, ...epoch };
}

function checkHeader(reader: OmmReader, whole: boolean): void {
  const version = whole ? reader.needed('CCSDS_OMM_VERS') : reader.text('CCSDS_OMM_VERS');
  if (version !== '' && !/^[123]\.\d+$/.test(version)) reader.refuse('CCSDS_OMM_VERS', '1.0, 2.0 or 3.0');
  // Published files leave the creation date empty, so only a wrong one is refused.
  const created = reader.text('CREATION_DATE');
  if (created !== '' && parseCcsdsTime(created) === undefined) {
    reader.refuse('CREATION_DATE', 'a date such as 2026-12-01T06:00:00');
  }
}

/** The message knows two ways to say how large the orbit is; SGP4 takes only the mean motion. */
function checkSize(reader: OmmReader): void {
  if (reader.text('SEMI_MAJOR_AXIS') === '') return;
  if (reader.text('MEAN_MOTION') !== '')
    reader.refuse('SEMI_MAJOR_AXIS', 'either MEAN_MOTION or SEMI_MAJOR_AXIS, not both');
  else reader.refuse('SEMI_MAJOR_AXIS', 'MEAN_MOTION in its place, which is what SGP4 needs');
}

function readOrbit(reader: OmmReader) {
  const sized = reader.text('SEMI_MAJOR_AXIS') !== '' && reader.text('MEAN_MOTION') === '';
  const motion = { min: Number.MIN_VALUE, max: 18, expected: 'more than 0 and at most 18 revolutions a day' };
  return {
    meanMotionRevPerDay: sized ? Number.NaN : reader.number('MEAN_MOTION', motion),
    eccentricity: reader.number('ECCENTRICITY', {
      min: 0,
      max: 1,
      below: true,
      expected: 'from 0 to below 1, which is what SGP4 can follow',
    }),
    inclinationDeg: reader.number('INCLINATION', { min: 0, max: 180, expected: 'an angle from 0 to 180 degrees' }),
    raanDeg: reader.number('RA_OF_ASC_NODE', ANGLE),
    argPerigeeDeg: reader.number('ARG_OF_PERICENTER', ANGLE),
    meanAnomalyDeg: reader.number('MEAN_ANOMALY', ANGLE),
  };
}

function readTleBlock(reader: OmmReader) {
  const type = reader.text('EPHEMERIS_TYPE');
  if (!['', '0', '2'].includes(type)) reader.refuse('EPHEMERIS_TYPE', '0: other types are not for SGP4');
  const classification = reader.text('CLASSIFICATION_TYPE') || 'U';
  if (!/^[A-Z]$/.test(classification)) reader.refuse('CLASSIFICATION_TYPE', 'one letter such as U');
  return {
    elementSetNumber: reader.count('ELEMENT_SET_NO', 9_999),
    revolutionAtEpoch: reader.count('REV_AT_EPOCH', 99_999_999),
    classification,
    bstarPerEarthRadius: reader.number('BSTAR', ANY),
    meanMotionDot: reader.number('MEAN_MOTION_DOT', ANY, 0),
    meanMotionDdot: reader.number('MEAN_MOTION_DDOT', ANY, 0),
  };
}
