/** The files for flying a contact: where to point, what to tune to, where the spacecraft is, and which elements say so. */
import {
  dopplerCurve,
  type LookAngles,
  lookAngles,
  oemToKvn,
  POINTING_CAUTION,
  pointingCsv,
  pointingRows,
  sampleOem,
  type TrajectorySource,
  toOmmKvn,
  uplinkFrequencyHz,
} from '@skyberth/orbit';
import type { Radio } from '@skyberth/shared';
import type { ElementsSpan, FileJob, FileOutcome } from '../workers/job-types.js';
import { radiosFor } from './objections.js';
import type { TrackTables } from './track-table.js';

/** Tables have a row a second; a contact of more than six hours gets fewer, so that no file outgrows its readers. */
const MOST_ROWS = 21_600;
/** An ephemeris is interpolated by who reads it: a state every 30 s with some before and after serves any order usual. */
const EPHEMERIS_STEP_MS = 30_000;
const EPHEMERIS_MARGIN_MS = 5 * EPHEMERIS_STEP_MS;

/** Writes one file. Elements that cannot be used are an outcome; a missing span is a fault of the caller. */
export function flightFile(job: FileJob, tables: TrackTables): FileOutcome {
  const span = job.spacecraft.spans.find((each) => each.fromMs <= job.tcaMs && job.tcaMs < each.toMs);
  if (span === undefined)
    return { kind: 'elements unusable', sentence: `${job.spacecraft.name} has no elements for this contact.` };
  const { source, ephemeris } = tables.originOf(span, job);
  const set = `elements of ${span.elementSet.epochUtc}`;
  const own = `ephemeris (${ephemeris?.source ?? ''})`;
  const from = source === 'element set' ? set : source === 'ephemeris' ? own : `${own} and ${set}`;
  return { kind: 'file', text: textOf(job, span, tables.source(span), from) };
}

/** @param from what the file was computed from, in words */
function textOf(job: FileJob, span: ElementsSpan, source: TrajectorySource, from: string): string {
  switch (job.file) {
    case 'pointing.csv':
      return heading(job, from) + pointingCsv(pointingRows(trackOf(job, source), nominal(job)));
    case 'frequency.csv':
      return heading(job, from) + caution() + frequencyCsv(job, trackOf(job, source));
    case 'ephemeris.oem':
      return ephemeris(job, span, source, from);
    case 'elements.omm':
      return toOmmKvn(span.elementSet, { creationUtc: utc(job.createdMs), originator: job.operatorName });
  }
}

function trackOf(job: FileJob, source: TrajectorySource): LookAngles[] {
  const lengthS = (job.losMs - job.aosMs) / 1000;
  const stepMs = Math.ceil(lengthS / MOST_ROWS) * 1000;
  const track: LookAngles[] = [];
  for (let timeMs = job.aosMs; timeMs < job.losMs; timeMs += stepMs)
    track.push(lookAngles(source, job.antenna.site, timeMs));
  track.push(lookAngles(source, job.antenna.site, job.losMs));
  return track;
}

/** Comment lines say what the table is about, since a file outlives the page it came from. */
function heading(job: FileJob, from: string): string {
  return [
    `${job.spacecraft.name} over ${job.antenna.name}, ${job.stationName}`,
    `${utc(job.aosMs)} to ${utc(job.losMs)}, ${from}`,
  ]
    .map(comment)
    .join('');
}

const caution = (): string => POINTING_CAUTION.map(comment).join('');
/** One line, whatever the name in it holds. */
const comment = (line: string): string => `# ${line.replace(/[\r\n]+/g, ' ')}\r\n`;
const utc = (timeMs: number): string => new Date(timeMs).toISOString();

/** The first radio of each direction is what the pointing table tunes to; the frequency table has them all. */
function nominal(job: FileJob): { downlinkHz?: number; uplinkHz?: number } {
  const radios = radiosFor(job.spacecraft, job.need, []);
  const down = radios.find((radio) => radio.direction === 'downlink');
  const up = radios.find((radio) => radio.direction === 'uplink');
  return {
    ...(down && { downlinkHz: down.centreFrequencyMhz * 1e6 }),
    ...(up && { uplinkHz: up.centreFrequencyMhz * 1e6 }),
  };
}

const FREQUENCY_COLUMNS = 'time_utc,radio,direction,nominal_hz,tune_hz,doppler_hz,doppler_rate_hz_s';

/** For each radio what to tune to: a downlink is received shifted, an uplink is sent shifted the other way. */
function frequencyCsv(job: FileJob, track: readonly LookAngles[]): string {
  const radios = radiosFor(job.spacecraft, job.need, []);
  const lines = radios.flatMap((radio) => frequencyLines(radio, track));
  return `${[FREQUENCY_COLUMNS, ...lines].join('\r\n')}\r\n`;
}

function frequencyLines(radio: Radio, track: readonly LookAngles[]): string[] {
  const nominalHz = radio.centreFrequencyMhz * 1e6;
  const name = `"${radio.name
    .replace(/[\r\n]+/g, ' ')
    .replaceAll('"', '""')
    .replace(/^[=+\-@]/, "'$&")}"`;
  return dopplerCurve(track, nominalHz).map((sample, index) => {
    const rangeRateKmPerS = track[index]?.rangeRateKmPerS ?? 0;
    const tuneHz =
      radio.direction === 'downlink' ? nominalHz + sample.dopplerHz : uplinkFrequencyHz(nominalHz, rangeRateKmPerS);
    return [
      utc(sample.timeMs),
      name,
      radio.direction,
      nominalHz.toFixed(0),
      tuneHz.toFixed(1),
      sample.dopplerHz.toFixed(1),
      sample.dopplerRateHzPerS.toFixed(3),
    ].join(',');
  });
}

/** CCSDS OEM in EME2000, reaching a little beyond the contact so that its ends can be interpolated too. */
function ephemeris(job: FileJob, span: ElementsSpan, source: TrajectorySource, from: string): string {
  const { elementSet } = span;
  return oemToKvn(
    sampleOem(source, {
      objectName: job.spacecraft.name,
      objectId: elementSet.objectId,
      originator: job.operatorName,
      creationMs: job.createdMs,
      fromMs: job.aosMs - EPHEMERIS_MARGIN_MS,
      toMs: job.losMs + EPHEMERIS_MARGIN_MS,
      stepS: EPHEMERIS_STEP_MS / 1000,
      frame: 'EME2000',
      comments: [
        `Contact over ${job.antenna.name} ${utc(job.aosMs)} to ${utc(job.losMs)}`,
        `Computed from ${from}; elements are propagated with SGP4`,
        ...POINTING_CAUTION,
      ].map((line) => line.replace(/[\r\n]+/g, ' ')),
    }),
  );
}
