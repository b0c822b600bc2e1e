/** What the system finds in the evidence, each finding with a weight: for a fault, against one, or neither. Pure. */
import type { DisputeEvidence, Finding } from '@skyberth/shared';

export type FindingInput = Pick<
  DisputeEvidence,
  'aosUtc' | 'losUtc' | 'track' | 'gap' | 'later' | 'sunClosestDeg' | 'station' | 'predictedBytes' | 'reportedBytes'
> & {
  readonly guardS: number;
  readonly sunKeepOffDeg: number;
  readonly reported: { readonly outcome: string; readonly cause: string } | null;
};

/** Closer than this over the mask and a few metres of tree decide. Common practice, no source. */
const CLEAR_OF_MASK_DEG = 1;
/** A link planned with less is easily lost. Common practice, no source. */
const AMPLE_MARGIN_DB = 3;
/** Less of the predicted volume than this is called short; the prediction itself is not better. Common practice, no source. */
const SHORT_VOLUME_SHARE = 0.8;

const seconds = (ms: number): string => `${Math.round(ms / 1000)} s`;
const degrees = (deg: number): string => `${deg.toFixed(1)}°`;

/** Every finding that the evidence allows; where something is not known, that is said. */
export function findingsOf(input: FindingInput): Finding[] {
  return [
    aboveTheMask(input),
    elementsAgree(input),
    linkMargin(input),
    sunApart(input),
    ...stationSaid(input),
    volume(input),
  ].filter((finding) => finding !== null);
}

/** The part of the track that the dispute is about: the gap, or all of the contact. */
function disputed({ track, gap }: FindingInput): FindingInput['track'] {
  if (gap === null) return track;
  const [fromMs, toMs] = [Date.parse(gap.fromUtc), Date.parse(gap.toUtc)];
  return track.filter(({ timeUtc }) => Date.parse(timeUtc) >= fromMs && Date.parse(timeUtc) <= toMs);
}

function aboveTheMask(input: FindingInput): Finding | null {
  const part = disputed(input);
  if (part.length === 0) return null;
  const where = input.gap ? 'in the gap' : 'in the contact';
  const clearance = Math.min(...part.map(({ elevationDeg, maskDeg }) => elevationDeg - maskDeg));
  const elevations = part.map(({ elevationDeg }) => elevationDeg);
  const range = `${degrees(Math.min(...elevations))} to ${degrees(Math.max(...elevations))}`;
  if (clearance >= CLEAR_OF_MASK_DEG || !input.gap)
    return {
      weight: 'clear',
      title: 'Visible throughout.',
      words: `The spacecraft stood at ${range} ${where}, at least ${degrees(Math.max(0, clearance))} above the mask.`,
    };
  return {
    weight: 'neutral',
    title: 'Close to the horizon.',
    words: `It stood at ${range} ${where}, at the least ${degrees(clearance)} from the mask; an obstacle may explain it.`,
  };
}

function elementsAgree({ later, guardS }: FindingInput): Finding {
  if (later === null)
    return {
      weight: 'neutral',
      title: 'No better elements.',
      words: 'Nothing nearer to the contact was given than what it was sold on.',
    };
  if (later.aosShiftS === null || later.losShiftS === null)
    return {
      weight: 'fault',
      title: 'Later elements do not find the pass.',
      words: `By the elements of ${later.epochUtc} there was no such pass. Those given by the operator were wrong, or a manoeuvre lies between.`,
    };
  const worst = Math.max(Math.abs(later.aosShiftS), Math.abs(later.losShiftS));
  const words = `Later ones move AOS by ${later.aosShiftS.toFixed(1)} s and LOS by ${later.losShiftS.toFixed(1)} s`;
  return worst <= guardS
    ? { weight: 'clear', title: 'Elements agree.', words: `${words}, inside the guard of ${guardS} s.` }
    : {
        weight: 'fault',
        title: 'The elements were off.',
        words: `${words}, more than the guard of ${guardS} s. The operator gave the elements.`,
      };
}

function linkMargin(input: FindingInput): Finding {
  const margins = disputed(input).flatMap(({ marginDb }) => (marginDb === null ? [] : [marginDb]));
  if (margins.length === 0)
    return {
      weight: 'neutral',
      title: 'Margin unknown.',
      words: 'The radios or bands as described do not allow to compute the link.',
    };
  const least = Math.min(...margins);
  const where = input.gap ? 'in the gap' : 'in the contact';
  const words = `${least.toFixed(1)} dB at the least ${where}, by what both sides described.`;
  if (least >= AMPLE_MARGIN_DB) return { weight: 'clear', title: 'Margin was ample.', words };
  if (least >= 0) return { weight: 'neutral', title: 'Margin was small.', words };
  return { weight: 'neutral', title: 'The link did not close all along.', words };
}

function sunApart({ sunClosestDeg, sunKeepOffDeg }: FindingInput): Finding | null {
  if (sunClosestDeg === null) return null;
  return sunClosestDeg > sunKeepOffDeg
    ? { weight: 'clear', title: 'No Sun in the beam.', words: `The Sun stood ${degrees(sunClosestDeg)} away or more.` }
    : {
        weight: 'neutral',
        title: 'Sun near the beam.',
        words: `The Sun came within ${degrees(sunClosestDeg)}; the station may have kept off it.`,
      };
}

function stationSaid({ station, gap, reported }: FindingInput): Finding[] {
  const findings: Finding[] = [];
  const acquired = station.filter(({ kind }) => kind === 'acquired');
  if (acquired.length === 0)
    findings.push({
      weight: 'fault',
      title: 'No acquisition reported.',
      words: 'The station never said that it heard the spacecraft.',
    });
  if (gap) {
    const [fromMs, toMs] = [Date.parse(gap.fromUtc), Date.parse(gap.toUtc)];
    const inGap = station.filter(({ atUtc }) => Date.parse(atUtc) >= fromMs - 1_000 && Date.parse(atUtc) <= toMs);
    const lost = inGap.find(({ kind }) => kind === 'lost');
    if (lost)
      findings.push({
        weight: 'fault',
        title: `Lost at ${lost.atUtc.slice(11, 19)}.`,
        words: `The station's own log has the loss; the gap is ${seconds(toMs - fromMs)} long.`,
      });
    for (const note of inGap.filter(({ kind }) => kind === 'note').slice(0, 3))
      findings.push({ weight: 'neutral', title: `Note at ${note.atUtc.slice(11, 19)}.`, words: note.words });
  }
  if (reported && reported.cause !== 'none')
    findings.push({
      weight: reported.cause === 'station' ? 'fault' : 'neutral',
      title: `Reported cause: ${reported.cause}.`,
      words: `The station reported the contact as ${reported.outcome}.`,
    });
  return findings;
}

function volume({ predictedBytes, reportedBytes }: FindingInput): Finding | null {
  if (predictedBytes === null || predictedBytes <= 0 || reportedBytes === null) return null;
  const share = reportedBytes / predictedBytes;
  const words = `${(reportedBytes / 1e6).toFixed(1)} MB were reported, ${(predictedBytes / 1e6).toFixed(1)} MB predicted (${Math.round(share * 100)} %).`;
  return share >= SHORT_VOLUME_SHARE
    ? { weight: 'clear', title: 'Volume as predicted.', words }
    : { weight: 'neutral', title: 'Volume is short.', words };
}
