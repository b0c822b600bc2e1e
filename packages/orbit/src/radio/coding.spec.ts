import { describe, expect, it } from 'vitest';
import { CODINGS, findCoding, MODULATIONS, proposedEbN0Db, tailOfGaussian, uncodedEbN0Db } from './coding.js';

describe('coding', () => {
  it('has the tail of the normal distribution', () => {
    // Standard normal table, common to every statistics handbook: 0.15866, 0.02275, 0.00135, 2.867e-7.
    expect(tailOfGaussian(0)).toBe(0.5);
    expect(tailOfGaussian(1)).toBeCloseTo(0.15865525, 8);
    expect(tailOfGaussian(2)).toBeCloseTo(0.02275013, 8);
    expect(tailOfGaussian(3)).toBeCloseTo(0.0013498980316, 12);
    expect(tailOfGaussian(5)).toBeCloseTo(2.866516e-7, 12);
  });

  it('needs 9.6 dB for one error in 1e5 and 10.5 dB for one in 1e6 on an uncoded coherent link', () => {
    // Common practice: the two figures of every link-budget course.
    expect(uncodedEbN0Db('QPSK', 1e-5)).toBeCloseTo(9.59, 2);
    expect(proposedEbN0Db('oqpsk', 'none')?.valueDb).toBeCloseTo(10.53, 2);
  });

  it('finds a coding however people write it, and proposes nothing where it knows nothing', () => {
    expect(findCoding('Convolutional 1/2')?.name).toBe('CCSDS convolutional 1/2');
    expect(findCoding('ccsds_ldpc 7/8')?.rate).toBeCloseTo(223 / 255, 12);
    expect(proposedEbN0Db('8PSK', 'CCSDS turbo 1/2')).toBeUndefined();
    expect(proposedEbN0Db('QPSK', 'house code')).toBeUndefined();
  });

  it('lies above the limit of Shannon for every coding, and below the uncoded link', () => {
    // Eb/N0 > (2^(2R) - 1) / 2R for a rate R a dimension: Shannon 1949.
    for (const { rate, requiredEbN0Db } of CODINGS) {
      if (requiredEbN0Db === undefined) continue;
      expect(requiredEbN0Db).toBeGreaterThan(10 * Math.log10((2 ** (2 * rate) - 1) / (2 * rate)));
      expect(requiredEbN0Db).toBeLessThan(uncodedEbN0Db('BPSK', 1e-6));
    }
    expect(new Set(MODULATIONS.map(({ name }) => name)).size).toBe(MODULATIONS.length);
  });
});
