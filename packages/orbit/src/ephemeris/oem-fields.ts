/** The rules for the keywords of an OEM, the same whether they came as KVN or XML. Source: CCSDS 502.0-B and NDM/XML. */
import { parseCcsdsTime } from './ccsds-time.js';
import { TIME_SYSTEMS, type TimeSystem, toUtcMs } from './leap-seconds.js';
import type { FaultList, OemFrame, OemInterpolation } from './oem.js';

/** A keyword's value and the line it stood on. */
export interface Field {
  readonly value: string;
  readonly line: number;
}
export type Fields = ReadonlyMap<string, Field>;

export const HEADER_KEYWORDS: readonly string[] = [
  'CCSDS_OEM_VERS',
  'CLASSIFICATION',
  'CREATION_DATE',
  'ORIGINATOR',
  'MESSAGE_ID',
];
export const METADATA_KEYWORDS: readonly string[] = [
  'OBJECT_NAME',
  'OBJECT_ID',
  'CENTER_NAME',
  'REF_FRAME',
  'REF_FRAME_EPOCH',
  'TIME_SYSTEM',
  'START_TIME',
  'USEABLE_START_TIME',
  'USEABLE_STOP_TIME',
  'STOP_TIME',
  'INTERPOLATION',
  'INTERPOLATION_DEGREE',
];

export interface OemHeader {
  readonly version: string;
  readonly creationDate: string;
  readonly originator: string;
  readonly messageId: string | undefined;
  readonly classification: string | undefined;
}

export interface OemMetadata {
  readonly objectName: string;
  readonly objectId: string;
  readonly centerName: string;
  readonly frame: OemFrame;
  readonly frameName: string;
  readonly timeSystem: TimeSystem;
  readonly startMs: number;
  readonly stopMs: number;
  readonly useableStartMs: number | undefined;
  readonly useableStopMs: number | undefined;
  readonly interpolation: OemInterpolation | undefined;
  readonly interpolationDegree: number | undefined;
}

/** Versions whose rules these are. */
const VERSIONS = ['1.0', '2.0', '3.0'];

export function readHeader(fields: Fields, faults: FaultList): OemHeader {
  const version = needed(fields, 'CCSDS_OEM_VERS', 1, faults);
  if (version !== '' && !VERSIONS.includes(version)) {
    faults.add({
      line: lineOf(fields, 'CCSDS_OEM_VERS', 1),
      field: 'CCSDS_OEM_VERS',
      found: version,
      expected: '1.0, 2.0 or 3.0',
    });
  }
  const creationDate = needed(fields, 'CREATION_DATE', 1, faults);
  if (creationDate !== '' && parseCcsdsTime(creationDate) === undefined) {
    faults.add({
      line: lineOf(fields, 'CREATION_DATE', 1),
      field: 'CREATION_DATE',
      found: creationDate,
      expected: DATE_FORM,
    });
  }
  return {
    version,
    creationDate,
    originator: needed(fields, 'ORIGINATOR', 1, faults),
    messageId: fields.get('MESSAGE_ID')?.value,
    classification: fields.get('CLASSIFICATION')?.value,
  };
}

const DATE_FORM = 'a date such as 2026-12-01T00:00:00';

/** Metadata of one segment; undefined where it lacks something that its states cannot be read without. */
export function readMetadata(fields: Fields, blockLine: number, faults: FaultList): OemMetadata | undefined {
  const objectName = needed(fields, 'OBJECT_NAME', blockLine, faults);
  const objectId = needed(fields, 'OBJECT_ID', blockLine, faults);
  const centerName = needed(fields, 'CENTER_NAME', blockLine, faults);
  if (centerName !== '' && centerName.toUpperCase() !== 'EARTH') {
    faults.add({
      line: lineOf(fields, 'CENTER_NAME', blockLine),
      field: 'CENTER_NAME',
      found: centerName,
      expected: 'EARTH',
    });
  }
  const frame = readFrame(fields, blockLine, faults);
  const timeSystem = readTimeSystem(fields, blockLine, faults);
  if (timeSystem === undefined) return undefined;
  const time = (keyword: string) => readTime(fields, keyword, timeSystem, faults);
  for (const keyword of ['START_TIME', 'STOP_TIME']) needed(fields, keyword, blockLine, faults);
  const startMs = time('START_TIME');
  const stopMs = time('STOP_TIME');
  const useableStartMs = time('USEABLE_START_TIME');
  const useableStopMs = time('USEABLE_STOP_TIME');
  if (startMs === undefined || stopMs === undefined || frame === undefined) return undefined;
  checkSpans({ startMs, stopMs, useableStartMs, useableStopMs }, fields, faults);
  return {
    objectName,
    objectId,
    centerName,
    frame,
    frameName: fields.get('REF_FRAME')!.value,
    timeSystem,
    startMs,
    stopMs,
    useableStartMs,
    useableStopMs,
    ...readInterpolation(fields, faults),
  };
}

function needed(fields: Fields, keyword: string, blockLine: number, faults: FaultList): string {
  const field = fields.get(keyword);
  if (field !== undefined && field.value !== '') return field.value;
  const line = field?.line ?? blockLine;
  faults.add({ line, field: keyword, found: '', expected: 'a value', message: `Line ${line}: ${keyword} is missing.` });
  return '';
}

function lineOf(fields: Fields, keyword: string, otherwise: number): number {
  return fields.get(keyword)?.line ?? otherwise;
}

function readFrame(fields: Fields, blockLine: number, faults: FaultList): OemFrame | undefined {
  const name = needed(fields, 'REF_FRAME', blockLine, faults);
  if (name === '') return undefined;
  const upper = name.toUpperCase();
  if (/^ITRF(-?\d{2,4})?$/.test(upper)) return 'ITRF';
  if (upper === 'EME2000' || upper === 'ICRF' || upper === 'GCRF' || upper === 'TEME') return upper;
  faults.add({
    line: lineOf(fields, 'REF_FRAME', blockLine),
    field: 'REF_FRAME',
    found: name,
    expected: 'EME2000, ICRF, GCRF, ITRF or TEME',
  });
  return undefined;
}

function readTimeSystem(fields: Fields, blockLine: number, faults: FaultList): TimeSystem | undefined {
  const name = needed(fields, 'TIME_SYSTEM', blockLine, faults);
  if (name === '') return undefined;
  const system = TIME_SYSTEMS.find((known) => known === name.toUpperCase());
  if (system === undefined) {
    faults.add({
      line: lineOf(fields, 'TIME_SYSTEM', blockLine),
      field: 'TIME_SYSTEM',
      found: name,
      expected: TIME_SYSTEMS.join(', '),
    });
  }
  return system;
}

function readTime(fields: Fields, keyword: string, system: TimeSystem, faults: FaultList): number | undefined {
  const field = fields.get(keyword);
  if (field === undefined || field.value === '') return undefined;
  const clockMs = parseCcsdsTime(field.value);
  if (clockMs === undefined) {
    faults.add({ line: field.line, field: keyword, found: field.value, expected: DATE_FORM });
    return undefined;
  }
  return toUtcMs(clockMs, system);
}

interface Spans {
  readonly startMs: number;
  readonly stopMs: number;
  readonly useableStartMs: number | undefined;
  readonly useableStopMs: number | undefined;
}

function checkSpans(spans: Spans, fields: Fields, faults: FaultList): void {
  const complain = (keyword: string, expected: string) => {
    const field = fields.get(keyword)!;
    faults.add({ line: field.line, field: keyword, found: field.value, expected });
  };
  const { startMs, stopMs, useableStartMs, useableStopMs } = spans;
  if (stopMs < startMs) complain('STOP_TIME', 'a time after START_TIME');
  if (useableStartMs !== undefined && (useableStartMs < startMs || useableStartMs > stopMs)) {
    complain('USEABLE_START_TIME', 'a time between START_TIME and STOP_TIME');
  }
  if (useableStopMs !== undefined && (useableStopMs > stopMs || useableStopMs < (useableStartMs ?? startMs))) {
    complain('USEABLE_STOP_TIME', 'a time between the usable start and STOP_TIME');
  }
}

function readInterpolation(
  fields: Fields,
  faults: FaultList,
): { interpolation: OemInterpolation | undefined; interpolationDegree: number | undefined } {
  const method = fields.get('INTERPOLATION');
  const degree = fields.get('INTERPOLATION_DEGREE');
  const interpolation = (['LINEAR', 'LAGRANGE', 'HERMITE'] as const).find(
    (name) => name === method?.value.toUpperCase(),
  );
  if (method !== undefined && interpolation === undefined) {
    faults.add({
      line: method.line,
      field: 'INTERPOLATION',
      found: method.value,
      expected: 'LINEAR, LAGRANGE or HERMITE',
    });
  }
  if (degree === undefined) return { interpolation, interpolationDegree: undefined };
  const interpolationDegree = /^\d{1,2}$/.test(degree.value) ? Number(degree.value) : 0;
  if (interpolationDegree < 1 || interpolationDegree > 15) {
    faults.add({
      line: degree.line,
      field: 'INTERPOLATION_DEGREE',
      found: degree.value,
      expected: 'a whole number from 1 to 15',
    });
  }
  return { interpolation, interpolationDegree };
}
