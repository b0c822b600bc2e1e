/** Writes a CCSDS OEM as KVN or XML so that reading it gives every number back. Times are written in UTC. */
import { formatCcsdsTime } from '../ephemeris/ccsds-time.js';
import type { Oem, OemCovariance, OemSegment } from '../ephemeris/oem.js';
import { COVARIANCE_FIELDS } from '../ephemeris/oem-xml.js';
import { escapeXml } from '../ephemeris/xml-tree.js';

type Pair = readonly [keyword: string, value: string];

function headerPairs(oem: Oem): Pair[] {
  return present([
    ['CLASSIFICATION', oem.classification],
    ['CREATION_DATE', oem.creationDate],
    ['ORIGINATOR', oem.originator],
    ['MESSAGE_ID', oem.messageId],
  ]);
}

function metadataPairs(segment: OemSegment): Pair[] {
  const time = (timeMs: number | undefined) => (timeMs === undefined ? undefined : formatCcsdsTime(timeMs));
  return present([
    ['OBJECT_NAME', segment.objectName],
    ['OBJECT_ID', segment.objectId],
    ['CENTER_NAME', segment.centerName],
    ['REF_FRAME', segment.frameName],
    ['TIME_SYSTEM', 'UTC'],
    ['START_TIME', time(segment.startMs)],
    ['USEABLE_START_TIME', time(segment.useableStartMs)],
    ['USEABLE_STOP_TIME', time(segment.useableStopMs)],
    ['STOP_TIME', time(segment.stopMs)],
    ['INTERPOLATION', segment.interpolation],
    ['INTERPOLATION_DEGREE', segment.interpolationDegree?.toString()],
  ]);
}

function present(pairs: readonly (readonly [string, string | undefined])[]): Pair[] {
  return pairs.filter((pair): pair is Pair => pair[1] !== undefined);
}

/** Version as read; 2.0 where MESSAGE_ID and CLASSIFICATION, which came with 3.0, are absent and none was given. */
export function oemToKvn(oem: Oem): string {
  const lines = [`CCSDS_OEM_VERS = ${oem.version}`, ...oem.comments.map(kvnComment)];
  for (const [keyword, value] of headerPairs(oem)) lines.push(`${keyword} = ${value}`);
  for (const segment of oem.segments) {
    lines.push('', 'META_START', ...segment.comments.map(kvnComment));
    for (const [keyword, value] of metadataPairs(segment)) lines.push(`${keyword} = ${value}`);
    lines.push('META_STOP', '');
    segment.timesMs.forEach((timeMs, row) => {
      lines.push([formatCcsdsTime(timeMs), ...stateNumbers(segment, row)].join(' '));
    });
    if (segment.covariances.length > 0)
      lines.push(
        '',
        ...segment.covariances.flatMap(kvnCovariance).toSpliced(0, 0, 'COVARIANCE_START'),
        'COVARIANCE_STOP',
      );
  }
  return `${lines.join('\n')}\n`;
}

function kvnComment(text: string): string {
  return `COMMENT ${text}`;
}

/** Shortest digits that read back as the same number. */
function stateNumbers(segment: OemSegment, row: number): string[] {
  const state = segment.states.subarray(6 * row, 6 * row + 6);
  const acceleration = segment.accelerations?.subarray(3 * row, 3 * row + 3) ?? [];
  return [...state, ...acceleration].map(String);
}

function kvnCovariance({ epochMs, frame, lowerTriangle }: OemCovariance): string[] {
  const lines = [`EPOCH = ${formatCcsdsTime(epochMs)}`];
  if (frame !== undefined) lines.push(`COV_REF_FRAME = ${frame}`);
  for (let row = 0, from = 0; row < 6; row += 1) {
    lines.push(
      lowerTriangle
        .slice(from, from + row + 1)
        .map(String)
        .join(' '),
    );
    from += row + 1;
  }
  return lines;
}

const STATE_ELEMENTS: readonly (readonly [name: string, units: string])[] = [
  ['X', 'km'],
  ['Y', 'km'],
  ['Z', 'km'],
  ['X_DOT', 'km/s'],
  ['Y_DOT', 'km/s'],
  ['Z_DOT', 'km/s'],
  ['X_DDOT', 'km/s**2'],
  ['Y_DDOT', 'km/s**2'],
  ['Z_DDOT', 'km/s**2'],
];

/** The same message by the NDM/XML schema of CCSDS 505.0-B. */
export function oemToXml(oem: Oem): string {
  const lines = [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<oem id="CCSDS_OEM_VERS" version="${escapeXml(oem.version)}">`,
    '<header>',
    ...oem.comments.map(xmlComment),
    ...headerPairs(oem).map(xmlPair),
    '</header>',
    '<body>',
  ];
  for (const segment of oem.segments) {
    lines.push('<segment>', '<metadata>', ...segment.comments.map(xmlComment));
    lines.push(...metadataPairs(segment).map(xmlPair), '</metadata>', '<data>');
    segment.timesMs.forEach((timeMs, row) => {
      const numbers = stateNumbers(segment, row).map((text, column) => {
        const [name, units] = STATE_ELEMENTS[column]!;
        return `<${name} units="${units}">${text}</${name}>`;
      });
      lines.push(`<stateVector><EPOCH>${formatCcsdsTime(timeMs)}</EPOCH>${numbers.join('')}</stateVector>`);
    });
    lines.push(...segment.covariances.map(xmlCovariance), '</data>', '</segment>');
  }
  lines.push('</body>', '</oem>');
  return `${lines.join('\n')}\n`;
}

function xmlPair([keyword, value]: Pair): string {
  return `<${keyword}>${escapeXml(value)}</${keyword}>`;
}

function xmlComment(text: string): string {
  return `<COMMENT>${escapeXml(text)}</COMMENT>`;
}

function xmlCovariance({ epochMs, frame, lowerTriangle }: OemCovariance): string {
  const numbers = COVARIANCE_FIELDS.map((name, index) => `<${name}>${lowerTriangle[index]!}</${name}>`).join('');
  const named = frame === undefined ? '' : `<COV_REF_FRAME>${escapeXml(frame)}</COV_REF_FRAME>`;
  return `<covarianceMatrix><EPOCH>${formatCcsdsTime(epochMs)}</EPOCH>${named}${numbers}</covarianceMatrix>`;
}
