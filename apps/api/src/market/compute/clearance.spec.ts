import { describe, expect, it } from 'vitest';
import { sampleAntenna, sampleCraft } from '../testing/samples.js';
import { clearanceOf } from './clearance.js';

const antenna = sampleAntenna();
const leave = {
  number: 7,
  spacecraftId: sampleCraft().id,
  stationId: antenna.stationId,
  band: 'S' as const,
  state: 'in force' as const,
  fromMs: Date.UTC(2026, 0, 1),
  toMs: Date.UTC(2027, 0, 1),
};
const verdict = (changes: Partial<typeof leave> | { state: 'requested' | 'granted' }, bands = ['S']) =>
  clearanceOf(sampleCraft({ clearances: [{ ...leave, ...changes }] }), antenna, bands);

describe('leave to transmit', () => {
  it('counts in its own band and station, from its first to its last moment', () => {
    expect(verdict({}).valid).toEqual([{ fromMs: leave.fromMs, toMs: leave.toMs }]);
    expect(verdict({}).sentence).toContain('from 2026-01-01 to 2027-01-01 only');
    expect(verdict({}, ['X']).valid).toEqual([]);
    expect(verdict({ stationId: 'another' }).valid).toEqual([]);
  });

  it('does not count before the station and the marketplace have both said yes, and says who is next', () => {
    expect(verdict({ state: 'requested' })).toMatchObject({ valid: [] });
    expect(verdict({ state: 'requested' }).sentence).toContain('Clearance 7');
    expect(verdict({ state: 'requested' }).sentence).toContain('the station has not answered yet');
    expect(verdict({ state: 'granted' }).sentence).toContain('the papers are being checked');
  });

  it('that nobody asked for can be asked for', () => {
    expect(clearanceOf(sampleCraft(), antenna, ['S']).remedy).toContain('Ask the station for a clearance');
  });
});
