import { describe, expect, it } from 'vitest';
import { readPage } from './use-page-number.js';

describe('the page in an address', () => {
  it('is a whole number from one', () => {
    expect(readPage('3')).toBe(3);
  });

  it('is the first one for anything else', () => {
    for (const text of [null, '', '0', '-2', '1.5', 'two', '1e9']) expect(readPage(text)).toBe(1);
  });
});
