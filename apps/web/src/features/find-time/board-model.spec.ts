import { describe, expect, it } from 'vitest';
import { boardModel, firstView, humpProfile, nextForSale, soleCurrency } from './board-model.js';
import { foundPass, heldBooking, searchResult } from './find-time-fixture.js';

const HOUR_MS = 3_600_000;

describe('the board of a search', () => {
  it('prices a pass for sale to the unit on the board and to the cent in words', () => {
    const [hump] = boardModel(searchResult(), []).humps;
    expect(hump).toMatchObject({ state: 'forSale', priceLabel: '€82', priceText: '€81.88', rowId: 'h1' });
    expect(hump?.reason).toBeUndefined();
  });

  it('marks a pass that is for sale only in part as refused, with its sentence', () => {
    const reason = { code: 'slew', word: 'no time to turn', sentence: 'The dish cannot turn in time.', remedy: null };
    const [hump] = boardModel(searchResult([foundPass({ state: 'part for sale', reasons: [reason] })]), []).humps;
    expect(hump).toMatchObject({ state: 'notForSale', reason: { word: 'no time to turn', refused: true } });
    expect(hump?.priceLabel).toBeUndefined();
  });

  it('draws somebody else’s time as taken', () => {
    const reason = { code: 'taken', word: 'taken', sentence: 'Someone else has it.', remedy: null };
    const [hump] = boardModel(searchResult([foundPass({ state: 'not for sale', reasons: [reason] })]), []).humps;
    expect(hump?.state).toBe('taken');
  });

  it('counts down a hold and shows the part that was held', () => {
    const held = heldBooking({ aosUtc: '2026-12-01T15:02:00.000Z' });
    const [hump] = boardModel(searchResult([foundPass({ state: 'held', bookingId: 'b1' })]), [held]).humps;
    expect(hump?.holdEndsMs).toBe(Date.UTC(2026, 11, 1, 14, 15));
    expect(hump?.part).toEqual({ fromMs: Date.UTC(2026, 11, 1, 15, 2), toMs: Date.UTC(2026, 11, 1, 15, 9, 35) });
  });

  it('lays blackouts and others’ contacts on the antenna’s row', () => {
    const model = boardModel(searchResult(), []);
    expect(model.blackouts[0]).toMatchObject({ rowId: 'h1', reason: 'Feed change' });
    expect(model.others[0]?.rowId).toBe('h1');
    expect(model.stations[0]?.rows[0]?.detail).toEqual(['7.3 m, S and X', 'from €6.40 a min']);
  });

  it('draws a profile from AOS to LOS, over a flat mask as over an uneven one', () => {
    const pass = foundPass();
    const { aosUtc, losUtc } = pass.geometry;
    const profile = humpProfile(pass);
    expect([profile.fromMs, profile.toMs]).toEqual([Date.parse(aosUtc), Date.parse(losUtc)]);
    const flat = humpProfile({ ...pass, profile: { ...pass.profile, maskDeg: [5] } });
    expect([...flat.maskDeg]).toEqual(pass.profile.elevationDeg.map(() => 5));
  });
});

describe('where the board opens', () => {
  const limits = { fromMs: Date.UTC(2026, 11, 1, 2), toMs: Date.UTC(2026, 11, 2, 2) };
  const { humps } = boardModel(searchResult(), []);

  it('begins at the beginning where nothing is for sale', () => {
    expect(firstView([], limits, 4 * HOUR_MS).fromMs).toBe(limits.fromMs);
  });

  it('goes to the first pass for sale where it lies further on, and not past the end', () => {
    const view = firstView(humps, limits, 4 * HOUR_MS);
    expect(view.fromMs).toBeLessThan(humps[0]?.aosMs ?? 0);
    expect(view.toMs).toBeGreaterThan(humps[0]?.losMs ?? 0);
    expect(firstView(humps, { ...limits, toMs: limits.fromMs + 14 * HOUR_MS }, 4 * HOUR_MS).toMs).toBeLessThanOrEqual(
      limits.fromMs + 14 * HOUR_MS,
    );
  });
});

describe('what is offered', () => {
  it('names the soonest passes for sale still to come', () => {
    const later = foundPass({
      key: 'later',
      geometry: { ...foundPass().geometry, aosUtc: '2026-12-01T18:00:00.000Z' },
    });
    const passes = [later, foundPass(), foundPass({ key: 'no', state: 'not for sale' })];
    expect(nextForSale(passes, Date.UTC(2026, 11, 1, 14), 3).map((one) => one.key)).toEqual(['w4-h1-15', 'later']);
    expect(nextForSale(passes, Date.UTC(2026, 11, 1, 16), 3).map((one) => one.key)).toEqual(['later']);
  });

  it('knows the currency only where there is one', () => {
    expect(soleCurrency(searchResult().stations)).toBe('EUR');
    expect(soleCurrency([])).toBeNull();
  });
});
