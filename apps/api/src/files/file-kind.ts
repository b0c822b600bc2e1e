/** What a file is, told by its bytes, and what it may be called. */
import { FILE_LIMITS, FILE_TYPES, type FileType } from '@skyberth/shared';

/** First bytes: PDF by ISO 32000-1 section 7.5.2, PNG by its specification section 5.2, JPEG by ITU-T T.81 annex B. */
const SIGNATURES: readonly (readonly [FileType, readonly number[]])[] = [
  ['application/pdf', [0x25, 0x50, 0x44, 0x46, 0x2d]],
  ['image/png', [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]],
  ['image/jpeg', [0xff, 0xd8, 0xff]],
];
/** Markup that a browser might carry out, at any place: a log or a table has no use for it. */
const MARKUP = /<\s*(?:!doctype|\?xml|html|head|body|script|svg|iframe|object|embed|math|style|link|meta)\b/i;
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is looked for
const CONTROLS = /[\u0000-\u0008\u000b\u000e-\u001f\u007f]/;

/** The type by content, or null where it is none that is taken. A name only tells a table from other text. */
export function sniff(bytes: Uint8Array, name: string): FileType | null {
  const signed = SIGNATURES.find(([, signature]) => signature.every((byte, index) => bytes[index] === byte));
  if (signed) return signed[0];
  if (!isPlainText(bytes)) return null;
  return extensionOf(name) === 'csv' ? 'text/csv' : 'text/plain';
}

function isPlainText(bytes: Uint8Array): boolean {
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return !CONTROLS.test(text) && !MARKUP.test(text) && !text.trimStart().startsWith('<');
  } catch {
    return false;
  }
}

const extensionOf = (name: string): string => /\.([^.]*)$/.exec(name)?.[1]?.toLowerCase() ?? '';

/**
 * A name that is safe to show and to save: the last part of any path, without control, format or direction characters and
 * without what file systems give a meaning to, ending in an extension of its type.
 */
export function safeName(given: string, type: FileType): string {
  const last = given.normalize('NFC').split(/[/\\]/).at(-1) ?? '';
  const clean = last
    .replace(/[\p{C}\p{Zl}\p{Zp}"<>|:*?]/gu, '')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  const extensions: readonly string[] = FILE_TYPES[type];
  const extension = extensionOf(clean);
  const kept = extensions.includes(extension) ? extension : (extensions[0] ?? '');
  const stem = extensions.includes(extension) ? clean.slice(0, -extension.length - 1) : clean;
  const room = FILE_LIMITS.nameCharacters - kept.length - 1;
  return `${Array.from(stem || 'file')
    .slice(0, room)
    .join('')}.${kept}`;
}
