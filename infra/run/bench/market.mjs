/** Invented spacecraft and stations for the bench, the same every time. */

const EPOCH = '2026-11-30T06:00:00.000000';
const FROM_MS = Date.parse('2026-12-01T00:00:00Z');
const DAY_MS = 86_400_000;

/** A small generator with a fixed seed (xorshift, 32 bits). */
function numbers(seed) {
  let state = seed;
  return () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 2 ** 32;
  };
}

export function market({ satellites, stations, days, uneven = false }) {
  const next = numbers(20_261_201);
  const elementSets = Array.from({ length: satellites }, (_, index) => ({
    format: 'omm-json',
    objectName: `CRAFT ${index + 1}`,
    objectId: '2026-900A',
    catalogNumber: 900_001 + index,
    epochUtc: `${EPOCH}Z`,
    epochMs: Date.parse(`${EPOCH}Z`),
    meanMotionRevPerDay: 14 + 1.3 * next(),
    eccentricity: 0.0003 + 0.002 * next(),
    inclinationDeg: 30 + 70 * next(),
    raanDeg: 359 * next(),
    argPerigeeDeg: 359 * next(),
    meanAnomalyDeg: 359 * next(),
    bstarPerEarthRadius: 4e-5,
    meanMotionDot: 0,
    meanMotionDdot: 0,
    elementSetNumber: 1,
    revolutionAtEpoch: 1,
    classification: 'U',
    sourceLine: 1,
  }));
  const sites = Array.from({ length: stations }, (_, index) => ({
    site: {
      latitudeDeg: (Math.asin(1.9 * next() - 0.95) * 180) / Math.PI,
      longitudeDeg: 360 * next() - 180,
      altitudeM: Math.round(1500 * next()),
    },
    mask:
      uneven && index % 2 === 1 ? Array.from({ length: 12 }, (_, corner) => [30 * corner, 3 + 15 * next()]) : [[0, 5]],
  }));
  const toMs = FROM_MS + days * DAY_MS;
  return { elementSets, sites, fromMs: FROM_MS, toMs, scenario: scenarioOf(elementSets, sites, toMs) };
}

function scenarioOf(elementSets, sites, toMs) {
  return {
    from: new Date(FROM_MS).toISOString(),
    to: new Date(toMs).toISOString(),
    satellites: elementSets.map((set) => ({ id: String(set.catalogNumber), name: set.objectName, omm: ommOf(set) })),
    stations: sites.map(({ site, mask }, index) => ({ id: `st-${String(index).padStart(3, '0')}`, ...site, mask })),
  };
}

const ommOf = (set) => ({
  OBJECT_NAME: set.objectName,
  OBJECT_ID: set.objectId,
  EPOCH,
  MEAN_MOTION: set.meanMotionRevPerDay,
  ECCENTRICITY: set.eccentricity,
  INCLINATION: set.inclinationDeg,
  RA_OF_ASC_NODE: set.raanDeg,
  ARG_OF_PERICENTER: set.argPerigeeDeg,
  MEAN_ANOMALY: set.meanAnomalyDeg,
  NORAD_CAT_ID: set.catalogNumber,
  BSTAR: set.bstarPerEarthRadius,
});
