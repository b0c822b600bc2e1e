/** The search that everybody writes first: satellite.js every 30 seconds, bisection where the elevation crosses the mask. */
import { ecfToLookAngles, eciToEcf, gstime, json2satrec, propagate } from 'satellite.js';
import { maskElevationDeg } from '../../../packages/orbit/dist/index.js';

const STEP_MS = 30_000;
const SHARP_MS = 1;
const DEG = Math.PI / 180;

function overMask(record, observer, mask, timeMs) {
  const date = new Date(timeMs);
  const { azimuth, elevation } = ecfToLookAngles(observer, eciToEcf(propagate(record, date).position, gstime(date)));
  return elevation / DEG - (mask.length === 1 ? mask[0][1] : maskElevationDeg(mask, azimuth / DEG));
}

function crossing(over, lowMs, highMs, rising) {
  let [low, high] = [lowMs, highMs];
  while (high - low > SHARP_MS) {
    const middle = (low + high) / 2;
    if (over(middle) > 0 === rising) high = middle;
    else low = middle;
  }
  return high;
}

function passesOf(over, fromMs, toMs) {
  const edges = [];
  let before = over(fromMs) > 0;
  for (let timeMs = fromMs + STEP_MS; timeMs <= toMs; timeMs += STEP_MS) {
    const now = over(timeMs) > 0;
    if (now !== before) edges.push(crossing(over, timeMs - STEP_MS, timeMs, now));
    before = now;
  }
  return edges.length >> 1;
}

/** Time for the first pairs of the demand, taken in stride over spacecraft and stations. */
export function plainSearch({ scenario, sites, fromMs, toMs }, mostPairs) {
  const pairs = scenario.satellites.length * sites.length;
  const wanted = Math.min(mostPairs, pairs);
  const started = performance.now();
  let passes = 0;
  for (let at = 0; at < wanted; at += 1) {
    const pair = Math.floor((at * pairs) / wanted);
    const { omm } = scenario.satellites[Math.floor(pair / sites.length)];
    const { site, mask } = sites[pair % sites.length];
    const observer = {
      latitude: site.latitudeDeg * DEG,
      longitude: site.longitudeDeg * DEG,
      height: site.altitudeM / 1000,
    };
    const record = json2satrec(omm);
    passes += passesOf((timeMs) => overMask(record, observer, mask, timeMs), fromMs, toMs);
  }
  return { ms: performance.now() - started, pairs: wanted, passes };
}
