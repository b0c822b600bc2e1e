/** Comma tables by RFC 4180: CRLF, quotes where a cell needs them. */

export function csvLine(cells: readonly string[]): string {
  return `${cells.map(csvCell).join(',')}\r\n`;
}

/**
 * Text that a spreadsheet would run as a formula gets a leading apostrophe; numbers, which may begin with a minus, do not.
 */
function csvCell(text: string): string {
  const safe = /^[=+\-@\t\r]/.test(text) && !Number.isFinite(Number(text)) ? `'${text}` : text;
  return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
