/** Rain: specific attenuation (Recommendation ITU-R P.838-3) and slant path attenuation (P.618-13). */

/** Sum of bell curves in log frequency plus a straight line: the form of equations (2) and (3) of P.838-3. */
interface Fit {
  readonly bells: readonly (readonly [height: number, centre: number, width: number])[];
  readonly slope: number;
  readonly offset: number;
}

/** P.838-3 Table 1: log k, horizontal. */
const LOG_K_HORIZONTAL: Fit = {
  bells: [
    [-5.3398, -0.10008, 1.13098],
    [-0.35351, 1.2697, 0.454],
    [-0.23789, 0.86036, 0.15354],
    [-0.94158, 0.64552, 0.16817],
  ],
  slope: -0.18961,
  offset: 0.71147,
};
/** P.838-3 Table 2: log k, vertical. */
const LOG_K_VERTICAL: Fit = {
  bells: [
    [-3.80595, 0.56934, 0.81061],
    [-3.44965, -0.22911, 0.51059],
    [-0.39902, 0.73042, 0.11899],
    [0.50167, 1.07319, 0.27195],
  ],
  slope: -0.16398,
  offset: 0.63297,
};
/** P.838-3 Table 3: alpha, horizontal. */
const ALPHA_HORIZONTAL: Fit = {
  bells: [
    [-0.14318, 1.82442, -0.55187],
    [0.29591, 0.77564, 0.19822],
    [0.32177, 0.63773, 0.13164],
    [-5.3761, -0.9623, 1.47828],
    [16.1721, -3.2998, 3.4399],
  ],
  slope: 0.67849,
  offset: -1.95537,
};
/** P.838-3 Table 4: alpha, vertical. */
const ALPHA_VERTICAL: Fit = {
  bells: [
    [-0.07771, 2.3384, -0.76284],
    [0.56727, 0.95545, 0.54039],
    [-0.20238, 1.1452, 0.26809],
    [-48.2991, 0.791669, 0.116226],
    [48.5833, 0.791459, 0.116479],
  ],
  slope: -0.053739,
  offset: 0.83433,
};

export interface RainCoefficients {
  readonly kHorizontal: number;
  readonly alphaHorizontal: number;
  readonly kVertical: number;
  readonly alphaVertical: number;
}

/** k and alpha of both linear polarisations, 1 to 1000 GHz. Source: ITU-R P.838-3 equations (2), (3), Tables 1 to 4. */
export function rainCoefficients(frequencyGhz: number): RainCoefficients {
  const logF = Math.log10(frequencyGhz);
  return {
    kHorizontal: 10 ** fitAt(LOG_K_HORIZONTAL, logF),
    alphaHorizontal: fitAt(ALPHA_HORIZONTAL, logF),
    kVertical: 10 ** fitAt(LOG_K_VERTICAL, logF),
    alphaVertical: fitAt(ALPHA_VERTICAL, logF),
  };
}

function fitAt(fit: Fit, logF: number): number {
  let sum = fit.slope * logF + fit.offset;
  for (const [height, centre, width] of fit.bells) sum += height * Math.exp(-(((logF - centre) / width) ** 2));
  return sum;
}

/** A ray through rain. Tilt is that of the polarisation against the horizontal: 0 horizontal, 90 vertical, 45 circular. */
export interface RainRay {
  readonly frequencyGhz: number;
  readonly elevationDeg: number;
  readonly polarisationTiltDeg: number;
}

/** k and alpha for a slanted ray of any polarisation. Source: ITU-R P.838-3 equations (4), (5). */
export function rainPowerLaw(ray: RainRay): { k: number; alpha: number } {
  const { kHorizontal, alphaHorizontal, kVertical, alphaVertical } = rainCoefficients(ray.frequencyGhz);
  const elevationRad = (ray.elevationDeg * Math.PI) / 180;
  const mix = Math.cos(elevationRad) ** 2 * Math.cos((2 * ray.polarisationTiltDeg * Math.PI) / 180);
  const k = (kHorizontal + kVertical + (kHorizontal - kVertical) * mix) / 2;
  const horizontal = kHorizontal * alphaHorizontal;
  const vertical = kVertical * alphaVertical;
  return { k, alpha: (horizontal + vertical + (horizontal - vertical) * mix) / (2 * k) };
}

/** dB/km in rain of `rainRateMmPerH`. Source: ITU-R P.838-3 equation (1). */
export function rainSpecificAttenuationDbPerKm(ray: RainRay, rainRateMmPerH: number): number {
  if (rainRateMmPerH <= 0) return 0;
  const { k, alpha } = rainPowerLaw(ray);
  return k * rainRateMmPerH ** alpha;
}

/**
 * What the rain of a place is. The digital maps of P.837 and P.839 are not part of this package, so both figures are
 * inputs; `rainRateMmPerH` is the rate exceeded 0.01 % of an average year, `rainHeightKm` is above mean sea level
 * (P.839: mean 0 degree isotherm plus 0.36 km).
 */
export interface RainClimate {
  readonly rainRateMmPerH: number;
  readonly rainHeightKm: number;
}

/**
 * What is assumed where an owner gave no rain figures: 42 mm/h and 3.0 km, a wet temperate place. An assumption of
 * ours (common practice, no source) and shown as such beside the result.
 */
export const ASSUMED_RAIN_CLIMATE: RainClimate = { rainRateMmPerH: 42, rainHeightKm: 3 };

export interface RainPath extends RainRay, RainClimate {
  readonly latitudeDeg: number;
  readonly stationHeightKm: number;
  /** Percentage of an average year for which the answer is exceeded, 0.001 to 5. */
  readonly exceedancePercent: number;
}

/** Effective Earth radius of P.618-13 section 2.2.1.1, km. */
const EFFECTIVE_EARTH_RADIUS_KM = 8500;

/**
 * Rain attenuation in dB exceeded for a percentage of an average year. Source: ITU-R P.618-13 section 2.2.1.1, steps 1
 * to 10. Stated there for frequencies to 55 GHz; zero where the station stands above the rain or it does not rain.
 */
export function rainAttenuationDb(path: RainPath): number {
  const depthKm = path.rainHeightKm - path.stationHeightKm;
  if (depthKm <= 0 || path.rainRateMmPerH <= 0) return 0;
  const sinE = Math.sin((path.elevationDeg * Math.PI) / 180);
  const cosE = Math.cos((path.elevationDeg * Math.PI) / 180);
  const slantKm =
    path.elevationDeg >= 5
      ? depthKm / sinE
      : (2 * depthKm) / (Math.sqrt(sinE * sinE + (2 * depthKm) / EFFECTIVE_EARTH_RADIUS_KM) + sinE);
  const gamma = rainSpecificAttenuationDbPerKm(path, path.rainRateMmPerH);
  const groundKm = slantKm * cosE;
  const shrink =
    1 / (1 + 0.78 * Math.sqrt((groundKm * gamma) / path.frequencyGhz) - 0.38 * (1 - Math.exp(-2 * groundKm)));
  const zetaDeg = (Math.atan2(depthKm, groundKm * shrink) * 180) / Math.PI;
  const rainPathKm = zetaDeg > path.elevationDeg ? (groundKm * shrink) / cosE : depthKm / sinE;
  const chiDeg = Math.max(0, 36 - Math.abs(path.latitudeDeg));
  const stretch =
    1 /
    (1 +
      Math.sqrt(sinE) *
        (31 *
          (1 - Math.exp(-path.elevationDeg / (1 + chiDeg))) *
          (Math.sqrt(rainPathKm * gamma) / path.frequencyGhz ** 2) -
          0.45));
  const exceeded001Db = gamma * rainPathKm * stretch;
  return atPercentage(exceeded001Db, path, sinE);
}

/** Step 10: from 0.01 % of the year to another percentage. */
function atPercentage(exceeded001Db: number, path: RainPath, sinE: number): number {
  const p = path.exceedancePercent;
  const latitude = Math.abs(path.latitudeDeg);
  let beta = 0;
  if (p < 1 && latitude < 36) {
    beta = -0.005 * (latitude - 36);
    if (path.elevationDeg < 25) beta += 1.8 - 4.25 * sinE;
  }
  const exponent = 0.655 + 0.033 * Math.log(p) - 0.045 * Math.log(exceeded001Db) - beta * (1 - p) * sinE;
  return exceeded001Db * (p / 0.01) ** -exponent;
}

/** Gases, rain, clouds and scintillation together, dB. Source: ITU-R P.618-13 section 2.5. */
export function totalAttenuationDb(parts: {
  gasDb: number;
  rainDb: number;
  cloudDb: number;
  scintillationDb: number;
}): number {
  return parts.gasDb + Math.hypot(parts.rainDb + parts.cloudDb, parts.scintillationDb);
}
