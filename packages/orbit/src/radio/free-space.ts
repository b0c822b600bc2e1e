import { SPEED_OF_LIGHT_M_PER_S } from './decibel.js';

/**
 * 20 log(4 pi 1e9 / c) for MHz and km: 32.4478 dB. Recommendation ITU-R P.525 prints it as 32.4;
 * we keep all its digits, so that two budgets made from one formula agree.
 */
const FREE_SPACE_CONSTANT_DB = 20 * Math.log10((4 * Math.PI * 1e9) / SPEED_OF_LIGHT_M_PER_S);

/**
 * Basic transmission loss between isotropic antennas in free space, in dB.
 * Source: Recommendation ITU-R P.525. Both arguments above zero.
 */
export function freeSpaceLossDb(link: { frequencyMhz: number; rangeKm: number }): number {
  return FREE_SPACE_CONSTANT_DB + 20 * Math.log10(link.frequencyMhz) + 20 * Math.log10(link.rangeKm);
}
