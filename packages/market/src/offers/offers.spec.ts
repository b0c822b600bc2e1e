import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type Interval, intersectIntervals, mergeIntervals, subtractIntervals, totalMs } from '../interval.js';
import { DAY_MS, HOUR_MS, MINUTE_MS } from '../time/local-time.js';
import type { OfferAntenna, OfferBooking, OfferPass, OffersInput } from './offer-types.js';
import { offersFor } from './offers.js';

const NOW = Date.UTC(2026, 11, 1, 14, 5, 9);
const at = (hour: number, minute = 0, second = 0): number => Date.UTC(2026, 11, 1, hour, minute, second);

/** The contact that the picture of the board refuses: Whimbrel 5 over Punta Cormorán 1. */
const pass: OfferPass = {
  id: 'w5',
  aosMs: at(16, 7, 50),
  tcaMs: at(16, 12, 30),
  losMs: at(16, 17, 15),
  clippedStart: false,
  clippedEnd: false,
  azimuthDeg: [20, 90, 170],
  azimuthAtDeg: () => 45,
};
const antenna: OfferAntenna = {
  name: 'Punta Cormorán 1',
  beams: 1,
  setupS: 45,
  teardownS: 0,
  minNoticeMin: 0,
  horizonDays: 30,
  minContactS: 120,
  maxContactS: 3600,
  partsAllowed: true,
  slewAzimuthDegPerS: 1.8,
};
const booking = (guardFromMs: number, guardToMs: number, change: Partial<OfferBooking> = {}): OfferBooking => ({
  beam: 1,
  guardFromMs,
  guardToMs,
  startAzimuthDeg: null,
  endAzimuthDeg: null,
  mine: false,
  ...change,
});

type Change = Partial<Omit<OffersInput, 'antenna'>> & { readonly antenna?: Partial<OfferAntenna> };
function offered(change: Change = {}, thePass: OfferPass = pass) {
  const input: OffersInput = {
    passes: [thePass],
    open: [{ fromMs: NOW - DAY_MS, toMs: NOW + 60 * DAY_MS }],
    blackouts: [],
    bookings: [],
    spacecraft: 'Whimbrel 5',
    spacecraftContacts: [],
    objections: [],
    clearance: null,
    nowMs: NOW,
    ...change,
    antenna: { ...antenna, ...change.antenna },
  };
  const [result] = offersFor(input);
  if (result === undefined) throw new Error('no answer');
  return result;
}
const words = (result: ReturnType<typeof offered>): string[] => result.lost.map((stretch) => stretch.word);

describe('offers', () => {
  it('sells a pass that nothing blocks as a whole', () => {
    expect(offered()).toEqual({
      passId: 'w5',
      offers: [
        {
          fromMs: pass.aosMs,
          toMs: pass.losMs,
          beam: 1,
          wholePass: true,
          suggested: { fromMs: pass.aosMs, toMs: pass.losMs },
          minPartS: 120,
          maxPartS: 565,
        },
      ],
      lost: [],
      refusal: null,
    });
  });

  it('keeps set-up and teardown out of a blackout', () => {
    const around = {
      antenna: { teardownS: 30 },
      blackouts: [{ fromMs: at(16, 12), toMs: at(16, 13), reason: 'own use' }],
    };
    expect(offered(around).offers.map((offer) => [offer.fromMs, offer.toMs])).toEqual([
      [pass.aosMs, at(16, 11, 30)],
      [at(16, 13, 45), pass.losMs],
    ]);
  });

  it('gives the pictured refusal: the dish cannot turn in time, and the part that could be sold', () => {
    const result = offered({ bookings: [booking(at(15, 57), at(16, 7, 22), { endAzimuthDeg: 214.6 })] });
    expect(result.refusal).toEqual({
      word: 'turn',
      code: 'turn',
      sentence:
        'The dish cannot turn in time. It leaves another contact at 16:07:22 facing 214.6°; turning 169.6° at 1.8° a second, and 45 s of set-up, take 2 min 19 s. From 16:09:41 the last 7 min 34 s could be sold.',
      remedy: 'Take the part after it, another pass, or another antenna.',
    });
    expect(result.offers).toHaveLength(1);
  });

  it('ends early where the dish must turn to the next contact', () => {
    const result = offered({
      antenna: { teardownS: 30 },
      bookings: [booking(at(16, 18), at(16, 30), { startAzimuthDeg: 225 })],
    });
    expect(result.refusal?.sentence).toBe(
      'The dish must turn away before the pass ends. The set-up for another contact begins at 16:18:00 facing 225.0°; 30 s of teardown, and turning 180.0° at 1.8° a second, take 2 min 10 s. The first 8 min 00 s, until 16:15:50, could be sold.',
    );
  });

  it('keeps set-up free after a contact whose pointing is unknown, and calls it taken', () => {
    const result = offered({ bookings: [booking(at(16, 0), at(16, 7, 40))] });
    expect(result.lost).toMatchObject([{ code: 'taken', fromMs: pass.aosMs, toMs: at(16, 8, 25) }]);
  });

  it('follows the azimuth of the pass when it looks for the first possible instant', () => {
    const sweeping: OfferPass = { ...pass, azimuthAtDeg: (timeMs) => 20 + ((timeMs - pass.aosMs) / 1000) * 0.3 };
    const [offer] = offered({ bookings: [booking(at(16, 0), at(16, 7, 22), { endAzimuthDeg: 100 })] }, sweeping).offers;
    const start = offer?.fromMs ?? 0;
    const turnS = (100 - (20 + ((start - pass.aosMs) / 1000) * 0.3)) / 1.8;
    expect(start).toBeGreaterThanOrEqual(at(16, 7, 22) + (turnS + 45) * 1000);
    expect(start).toBeLessThan(at(16, 7, 22) + (turnS + 45) * 1000 + 2);
  });

  it.each<[string, Change, string[], string]>([
    [
      'an unfit band',
      {
        objections: [
          {
            code: 'band',
            sentence: 'It receives 2200 to 2290 MHz; the radio needs 8212.5 MHz.',
            remedy: 'Choose another radio.',
          },
        ],
      },
      ['band'],
      'It receives 2200 to 2290 MHz',
    ],
    [
      'no clearance',
      {
        clearance: {
          valid: [],
          sentence: 'Whimbrel 5 has no clearance to transmit here in S band.',
          remedy: 'Ask the station for one.',
        },
      },
      ['clearance'],
      'no clearance to transmit',
    ],
    [
      'a clearance that ends in the pass',
      {
        clearance: {
          valid: [{ fromMs: 0, toMs: at(16, 12) }],
          sentence: 'The clearance ends at 16:12:00.',
          remedy: 'Ask for a new one.',
        },
      },
      ['clearance'],
      'The first 4 min 10 s, until 16:12:00, could be sold.',
    ],
    [
      'a set-up that no longer fits',
      { nowMs: at(16, 7, 30), antenna: { minNoticeMin: 0 } },
      ['too late'],
      '45 s of set-up no longer fit before it. From 16:08:15 the last 9 min 00 s could be sold.',
    ],
    ['a pass that has begun', { nowMs: at(16, 17) }, ['too late'], 'This pass began at 16:07:50.'],
    [
      'too little notice',
      { antenna: { minNoticeMin: 180 } },
      ['notice'],
      'wants 3 h of notice. Bought now, a contact begins at 17:05:09 at the earliest',
    ],
    [
      'a pass too far ahead',
      { nowMs: NOW - 31 * DAY_MS },
      ['not yet'],
      'is sold 30 days ahead, now until 2026-11-30 14:05:09',
    ],
    ['closing time', { open: [{ fromMs: 0, toMs: at(16, 12) }] }, ['closed'], 'is not open from 16:12:00 to 16:17:15'],
    [
      'a blackout',
      { blackouts: [{ fromMs: at(15), toMs: at(17), reason: 'feed change' }] },
      ['blackout'],
      'out of service from 15:00:00 to 17:00:00 (feed change)',
    ],
    [
      "another's contact",
      { bookings: [booking(at(16), at(16, 20))] },
      ['taken'],
      'Another contact keeps the antenna from 16:00:00 to 16:20:00',
    ],
    [
      'a contact of one’s own',
      { bookings: [booking(at(16), at(16, 20), { mine: true })] },
      ['yours'],
      'Your own contact keeps the antenna',
    ],
    [
      'a contact elsewhere',
      { spacecraftContacts: [{ fromMs: at(16), toMs: at(16, 20), antennaName: 'Hollenvik 1' }] },
      ['busy'],
      'Whimbrel 5 already has a contact with Hollenvik 1',
    ],
    [
      'a pass too short',
      { antenna: { minContactS: 600 } },
      ['short'],
      'The pass lasts 9 min 25 s; Punta Cormorán 1 sells contacts of at least 10 min 00 s.',
    ],
    [
      'a whole pass too long',
      { antenna: { partsAllowed: false, maxContactS: 300 } },
      ['long'],
      'sells whole passes of at most 5 min 00 s',
    ],
  ])('refuses %s with one word and a sentence', (_name, change, expectedWords, sentence) => {
    const result = offered(change);
    expect(words(result)).toEqual(expectedWords);
    expect(result.refusal?.word).toBe(expectedWords[0]);
    expect(result.refusal?.sentence).toContain(sentence);
    expect(result.refusal?.remedy).not.toBe('');
  });

  it('gives the geometry’s own sentence for what the mount cannot follow', () => {
    const limited: OfferPass = {
      ...pass,
      limits: [{ fromMs: at(16, 12), toMs: at(16, 13), sentence: 'The dish cannot follow near the zenith.' }],
    };
    const result = offered({}, limited);
    expect(result.refusal?.sentence).toBe(
      'The dish cannot follow near the zenith. 2 parts, together 8 min 25 s, could be sold.',
    );
  });

  it('sells nothing of a blocked pass where only whole passes are sold, and says so', () => {
    const result = offered({ antenna: { partsAllowed: false }, open: [{ fromMs: 0, toMs: at(16, 16) }] });
    expect(result.offers).toEqual([]);
    expect(result.lost.map((stretch) => stretch.code)).toEqual(['whole only', 'closed']);
    expect(result.refusal?.word).toBe('closed');
    expect(result.refusal?.sentence).toContain('sells whole passes only, and part of this one cannot be sold.');
  });

  it('does not call a pass whole that the period cuts', () => {
    const cut: OfferPass = { ...pass, clippedEnd: true };
    expect(offered({ antenna: { partsAllowed: false } }, cut).refusal?.word).toBe('cut off');
    const parts = offered({}, cut);
    expect(parts.offers[0]?.wholePass).toBe(false);
    expect(parts.refusal?.code).toBe('period');
  });

  it('proposes the longest part about the highest point of a pass that is longer than a contact may be', () => {
    const [offer] = offered({ antenna: { maxContactS: 300 } }).offers;
    expect(offer).toMatchObject({
      suggested: { fromMs: pass.tcaMs - 150_000, toMs: pass.tcaMs + 150_000 },
      maxPartS: 300,
      wholePass: false,
    });
  });

  it('sells a second beam when the first is taken', () => {
    const result = offered({ antenna: { beams: 2 }, bookings: [booking(at(16), at(16, 20))] });
    expect(result.offers).toMatchObject([{ beam: 2, wholePass: true }]);
    expect(result.lost).toEqual([]);
  });

  it('refuses an antenna that contradicts itself', () => {
    expect(() => offered({ antenna: { maxContactS: 60 } })).toThrow('the longest contact (60 s) is shorter');
    expect(() => offered({ bookings: [booking(0, 1, { beam: 3 })] })).toThrow('beam 3 of 1');
  });
});

const START = at(12, 0);
// Two hours full of everything, so that most passes meet an edge.
const minutes = fc.integer({ min: 0, max: 120 });
const stretch = fc
  .tuple(minutes, fc.integer({ min: 1, max: 30 }))
  .map(([from, length]): Interval => ({ fromMs: START + from * MINUTE_MS, toMs: START + (from + length) * MINUTE_MS }));
const azimuth = fc.option(fc.integer({ min: 0, max: 359 }));

const scenes = fc.record({
  antenna: fc.record({
    beams: fc.integer({ min: 1, max: 3 }),
    setupS: fc.integer({ min: 0, max: 300 }),
    teardownS: fc.integer({ min: 0, max: 300 }),
    minNoticeMin: fc.integer({ min: 0, max: 60 }),
    minContactS: fc.integer({ min: 10, max: 120 }),
    partsAllowed: fc.boolean(),
    slewAzimuthDegPerS: fc.double({ min: 0.5, max: 10, noNaN: true }),
  }),
  passes: fc.array(fc.tuple(minutes, fc.integer({ min: 1, max: 20 }), azimuth, azimuth), {
    minLength: 1,
    maxLength: 4,
  }),
  open: fc.array(stretch, { maxLength: 4 }),
  blackouts: fc.array(stretch, { maxLength: 3 }),
  taken: fc.array(fc.tuple(stretch, fc.integer({ min: 1, max: 3 }), azimuth, azimuth), { maxLength: 6 }),
  busy: fc.array(stretch, { maxLength: 2 }),
  nowMin: fc.integer({ min: -60, max: 60 }),
});
type Scene = typeof scenes extends fc.Arbitrary<infer S> ? S : never;

function inputOf(scene: Scene, blackouts: readonly Interval[] = scene.blackouts): OffersInput {
  return {
    antenna: { ...antenna, ...scene.antenna, horizonDays: 1, maxContactS: 900 },
    passes: scene.passes.map(([from, length, a, b], index) => ({
      ...pass,
      azimuthAtDeg: undefined,
      id: String(index),
      aosMs: START + from * MINUTE_MS,
      tcaMs: START + (from + length / 2) * MINUTE_MS,
      losMs: START + (from + length) * MINUTE_MS,
      azimuthDeg: [a ?? 10, 180, b ?? 350] as const,
    })),
    open: [...scene.open, { fromMs: START, toMs: START + 1.5 * HOUR_MS }],
    blackouts: blackouts.map((each) => ({ ...each, reason: 'maintenance' })),
    bookings: scene.taken
      .filter(([, beam]) => beam <= scene.antenna.beams)
      .map(([each, beam, a, b]) => ({
        beam,
        guardFromMs: each.fromMs,
        guardToMs: each.toMs,
        startAzimuthDeg: a,
        endAzimuthDeg: b,
        mine: false,
      })),
    spacecraft: 'Whimbrel 5',
    spacecraftContacts: scene.busy.map((each) => ({ ...each, antennaName: 'Hollenvik 1' })),
    objections: [],
    clearance: null,
    nowMs: START + scene.nowMin * MINUTE_MS,
  };
}

describe('offers, whatever the day looks like', () => {
  it('are the pass together with what is lost, and no instant is in both or lost twice', () => {
    fc.assert(
      fc.property(scenes, (scene) => {
        const input = inputOf(scene);
        offersFor(input).forEach((result, index) => {
          const whole = input.passes[index] as OfferPass;
          const offers = mergeIntervals(result.offers);
          expect(mergeIntervals([...offers, ...result.lost])).toEqual([{ fromMs: whole.aosMs, toMs: whole.losMs }]);
          expect(intersectIntervals(offers, result.lost)).toEqual([]);
          expect(totalMs(result.lost)).toBeCloseTo(
            result.lost.reduce((sum, each) => sum + each.toMs - each.fromMs, 0),
            3,
          );
          expect(result.refusal === null).toBe(result.offers.some((offer) => offer.wholePass));
        });
      }),
    );
  });

  it('stay clear, with set-up and teardown, of blackouts and of every contact on their beam, and within opening hours', () => {
    fc.assert(
      fc.property(scenes, (scene) => {
        const input = inputOf(scene);
        for (const offer of offersFor(input).flatMap((result) => result.offers)) {
          const guarded = [
            { fromMs: offer.fromMs - input.antenna.setupS * 1000, toMs: offer.toMs + input.antenna.teardownS * 1000 },
          ];
          const others = input.bookings
            .filter((each) => each.beam === offer.beam)
            .map((each) => ({ fromMs: each.guardFromMs, toMs: each.guardToMs }));
          // Binary fractions of a millisecond may be left over where a guard is subtracted and added again.
          expect(totalMs(intersectIntervals(guarded, [...others, ...input.blackouts]))).toBeLessThan(0.01);
          expect(subtractIntervals([offer], input.open)).toEqual([]);
          expect(offer.toMs - offer.fromMs).toBeGreaterThanOrEqual(input.antenna.minContactS * 1000);
          expect(offer.fromMs).toBeGreaterThanOrEqual(input.nowMs + input.antenna.minNoticeMin * MINUTE_MS);
        }
      }),
    );
  });

  it('never grow when a blackout is added', () => {
    fc.assert(
      fc.property(scenes, stretch, (scene, more) => {
        const before = offersFor(inputOf(scene));
        const after = offersFor(inputOf(scene, [...scene.blackouts, more]));
        after.forEach((result, index) => {
          expect(subtractIntervals(result.offers, before[index]?.offers ?? [])).toEqual([]);
        });
      }),
    );
  });
});
