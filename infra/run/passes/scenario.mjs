/** Reads a scenario and names everything that is wrong with it, one sentence a problem. */
import { compileMask, OrbitError, parseElementSets, siteFrame } from '../../../packages/orbit/dist/index.js';

const LONGEST_PERIOD_MS = 3_660 * 86_400_000;
const MOST_PROBLEMS = 200;
const ISO = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d+)?)?Z$/;

const isObject = (value) => typeof value === 'object' && value !== null && !Array.isArray(value);
const shown = (value) => JSON.stringify(value)?.slice(0, 60) ?? 'nothing';

/** The scenario sorted by the names of satellites and stations, or the problems that keep it from being searched. */
export function readScenario(text) {
  const problems = [];
  const say = (sentence) => {
    if (problems.length < MOST_PROBLEMS) problems.push(sentence);
    else if (problems.length === MOST_PROBLEMS)
      problems.push('There are more problems than these; the rest is not listed.');
  };
  let json;
  try {
    json = JSON.parse(text);
  } catch (error) {
    return { problems: [`The scenario is not well-formed JSON: ${error.message.replace(/\s+/g, ' ')}.`] };
  }
  if (!isObject(json)) return { problems: ['The scenario must be a JSON object.'] };
  const fromMs = readTime('from', json.from, say);
  const toMs = readTime('to', json.to, say);
  if (toMs <= fromMs) say(`The period ends at ${json.to}, which is not after its start ${json.from}.`);
  if (toMs - fromMs > LONGEST_PERIOD_MS) say('The period lasts more than ten years.');
  const satellites = readList('satellites', json.satellites, readSatellite, say);
  const sites = readList('stations', json.stations, readStation, say);
  return { problems, scenario: { fromMs, toMs, satellites, sites } };
}

function readTime(name, value, say) {
  const timeMs = typeof value === 'string' && ISO.test(value) ? Date.parse(value) : Number.NaN;
  if (Number.isNaN(timeMs)) say(`"${name}" is ${shown(value)}; it must be a UTC time such as "2026-12-01T00:00:00Z".`);
  return timeMs;
}

function readList(name, list, readOne, say) {
  if (!Array.isArray(list) || list.length === 0) {
    say(`"${name}" must be a list with at least one entry.`);
    return [];
  }
  const seen = new Set();
  const read = list.flatMap((entry, index) => {
    const label = `Entry ${index + 1} of "${name}"`;
    if (!isObject(entry)) return say(`${label} is ${shown(entry)}; it must be an object.`) ?? [];
    if (typeof entry.id !== 'string' || entry.id === '') return say(`${label} has no "id".`) ?? [];
    if (seen.has(entry.id)) say(`The id "${entry.id}" stands more than once in "${name}".`);
    seen.add(entry.id);
    return readOne(entry, say) ?? [];
  });
  return read.sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
}

function readSatellite(entry, say) {
  const label = `Satellite ${entry.id}`;
  const { tle, omm } = entry;
  if ((tle === undefined) === (omm === undefined)) return say(`${label} needs either "tle" or "omm".`);
  if (omm !== undefined && !isObject(omm)) return say(`${label}: "omm" is ${shown(omm)}; it must be an object.`);
  if (tle !== undefined && !(Array.isArray(tle) && tle.length === 2 && tle.every((line) => typeof line === 'string')))
    return say(`${label}: "tle" must be a list of two lines.`);
  const text = tle ? tle.join('\n') : JSON.stringify({ OBJECT_NAME: entry.name ?? entry.id, ...omm });
  const { sets, faults } = parseElementSets(text, { format: tle ? 'tle' : 'omm-json' });
  for (const { message } of faults) say(`${label}: ${message}`);
  return sets.length === 1 && faults.length === 0 ? { id: entry.id, elementSet: sets[0] } : undefined;
}

function readStation(entry, say) {
  const label = `Station ${entry.id}`;
  const { latitudeDeg, longitudeDeg, altitudeM = 0, mask } = entry;
  const site = { latitudeDeg, longitudeDeg, altitudeM };
  for (const [name, value] of Object.entries(site)) {
    if (typeof value !== 'number') return say(`${label}: "${name}" is ${shown(value)}; it must be a number.`);
  }
  const isPoint = (point) =>
    Array.isArray(point) && point.length === 2 && point.every((value) => typeof value === 'number');
  if (!Array.isArray(mask) || !mask.every(isPoint))
    return say(`${label}: "mask" must be a list of [azimuth, elevation] in degrees.`);
  try {
    siteFrame(site);
    compileMask(mask);
    return { id: entry.id, site, mask };
  } catch (error) {
    if (!(error instanceof OrbitError)) throw error;
    return say(`${label}: ${error.message}`);
  }
}
