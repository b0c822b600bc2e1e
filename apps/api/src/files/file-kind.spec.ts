import { describe, expect, it } from 'vitest';
import { safeName, sniff } from './file-kind.js';

const text = (value: string) => new TextEncoder().encode(value);

describe('the kind of a file', () => {
  // Signatures: ISO 32000-1 section 7.5.2, PNG specification section 5.2, ITU-T T.81 annex B.
  it('is told by its first bytes, whatever its name says', () => {
    expect(sniff(text('%PDF-1.7\n'), 'plot.png')).toBe('application/pdf');
    expect(sniff(Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a), 'a.pdf')).toBe('image/png');
    expect(sniff(Uint8Array.of(0xff, 0xd8, 0xff, 0xe0), 'a')).toBe('image/jpeg');
    expect(sniff(text('time,level\n1,2\n'), 'levels.CSV')).toBe('text/csv');
    expect(sniff(text('Größe: 5 µV\n'), 'notes.log')).toBe('text/plain');
  });

  it.each([
    ['a program', Uint8Array.of(0x7f, 0x45, 0x4c, 0x46, 2, 1)],
    ['an archive', Uint8Array.of(0x50, 0x4b, 3, 4)],
    ['broken UTF-8', Uint8Array.of(0x61, 0xc3, 0x28)],
    ['a page', text('\n <!DOCTYPE html><p>hello')],
    ['a drawing that can run scripts', text('<svg xmlns="http://www.w3.org/2000/svg" onload="x()"/>')],
    ['markup behind a harmless line', text('time,level\n1,2\n< script>x()</script>')],
    ['text with a null', text('a\u0000b')],
  ] as const)('is not taken: %s', (_what, bytes) => {
    expect(sniff(bytes, 'paper.pdf')).toBeNull();
  });
});

describe('the name of a file', () => {
  it.each([
    ['../../etc/passwd', 'passwd.pdf'],
    ['C:\\papers\\licence.PDF', 'licence.pdf'],
    ['invoice\u202Efdp.exe', 'invoicefdp.exe.pdf'],
    ['a\r\nSet-Cookie: x.pdf', 'aSet-Cookie x.pdf'],
    ['...', 'file.pdf'],
    ['paper.html', 'paper.html.pdf'],
    ['Lizenz Ka-Band №4.pdf', 'Lizenz Ka-Band №4.pdf'],
  ])('%j becomes %j', (given, kept) => {
    expect(safeName(given, 'application/pdf')).toBe(kept);
  });

  it('is cut to what a list can show, between characters', () => {
    const name = safeName('🛰'.repeat(300), 'text/plain');
    expect(Array.from(name)).toHaveLength(120);
    expect(name.endsWith('🛰.txt')).toBe(true);
  });
});
