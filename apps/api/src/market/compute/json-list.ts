/** Joins many pieces of JSON into one list of bytes, without ever making one long string of them. */

/** A byte of the text is at most three in UTF-8 for each unit of a JavaScript string. */
const MOST_BYTES_A_UNIT = 3;
const COMMA = 0x2c;
const CLOSE = 0x7d;

/** An object in two pieces: text without its closing brace, and further members as bytes that are kept. */
export interface ObjectPieces {
  readonly head: string;
  readonly members: Uint8Array;
}

/** `{head,members},{head,members}…` as UTF-8, in a buffer of its own that can be handed to another thread. */
export function joinObjects(objects: readonly ObjectPieces[]): Uint8Array {
  let most = 0;
  for (const { head, members } of objects) most += head.length * MOST_BYTES_A_UNIT + members.byteLength + 3;
  const out = Buffer.from(new ArrayBuffer(most));
  let at = 0;
  for (const { head, members } of objects) {
    if (at > 0) out[at++] = COMMA;
    at += out.write(head, at);
    out[at++] = COMMA;
    out.set(members, at);
    at += members.byteLength;
    out[at++] = CLOSE;
  }
  return new Uint8Array(out.buffer, 0, at);
}
