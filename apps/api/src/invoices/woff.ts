/** Unpacks a WOFF 1.0 font (W3C Recommendation, 2012) into the sfnt it holds, so that it need not be inflated anew for each page. */
import { inflateSync } from 'node:zlib';

const HEADER_BYTES = 44;
const ENTRY_BYTES = 20;
const SFNT_HEADER_BYTES = 12;
const SFNT_ENTRY_BYTES = 16;
const SIGNATURE = 0x774f4646;

const aligned = (bytes: number): number => (bytes + 3) & ~3;

/** @throws Error where the file is no WOFF. */
export function sfntOf(woff: Buffer): Buffer {
  if (woff.length < HEADER_BYTES || woff.readUInt32BE(0) !== SIGNATURE) throw new Error('The font file is not a WOFF.');
  const count = woff.readUInt16BE(12);
  const tables = Array.from({ length: count }, (_unused, index) => {
    const at = HEADER_BYTES + index * ENTRY_BYTES;
    const [offset, packed, length] = [woff.readUInt32BE(at + 4), woff.readUInt32BE(at + 8), woff.readUInt32BE(at + 12)];
    const stored = woff.subarray(offset, offset + packed);
    return {
      tag: woff.subarray(at, at + 4),
      checksum: woff.readUInt32BE(at + 16),
      data: packed < length ? inflateSync(stored) : stored,
    };
  });
  const bodyAt = SFNT_HEADER_BYTES + count * SFNT_ENTRY_BYTES;
  const sfnt = Buffer.alloc(bodyAt + tables.reduce((sum, table) => sum + aligned(table.data.length), 0));
  writeHeader(sfnt, woff.readUInt32BE(4), count);
  let offset = bodyAt;
  for (const [index, table] of tables.entries()) {
    const at = SFNT_HEADER_BYTES + index * SFNT_ENTRY_BYTES;
    table.tag.copy(sfnt, at);
    sfnt.writeUInt32BE(table.checksum, at + 4);
    sfnt.writeUInt32BE(offset, at + 8);
    sfnt.writeUInt32BE(table.data.length, at + 12);
    table.data.copy(sfnt, offset);
    offset += aligned(table.data.length);
  }
  return sfnt;
}

/** The search fields are those of the OpenType specification's table directory. */
function writeHeader(sfnt: Buffer, flavour: number, count: number): void {
  const power = Math.floor(Math.log2(count));
  sfnt.writeUInt32BE(flavour, 0);
  sfnt.writeUInt16BE(count, 4);
  sfnt.writeUInt16BE(2 ** power * 16, 6);
  sfnt.writeUInt16BE(power, 8);
  sfnt.writeUInt16BE(count * 16 - 2 ** power * 16, 10);
}
