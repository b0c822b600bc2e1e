/** OMM as a table: a header row of keywords, a row for each element set. Commas may stand inside double quotes. */
import type { ElementFaults } from './faults.js';
import { isOmmKeyword, type OmmField, type OmmMessage } from './omm-fields.js';

export function readOmmCsv(text: string, faults: ElementFaults): OmmMessage[] {
  const rows = text.split(/\r\n|\n|\r/);
  const headerAt = rows.findIndex((row) => row.trim() !== '');
  const keywords = cellsOf(rows[headerAt] ?? '').map((cell) => cell.trim());
  const messages: OmmMessage[] = [];
  for (let at = headerAt + 1; at < rows.length; at += 1) {
    const row = rows[at] ?? '';
    if (row.trim() === '') continue;
    const line = at + 1;
    const cells = cellsOf(row);
    if (cells.length !== keywords.length) {
      faults.add({
        line,
        field: 'row',
        found: `${cells.length} cells`,
        expected: `${keywords.length} cells, as in the header`,
      });
      continue;
    }
    const fields = new Map<string, OmmField>();
    for (const [column, keyword] of keywords.entries()) {
      if (isOmmKeyword(keyword)) fields.set(keyword, { value: (cells[column] ?? '').trim(), line });
    }
    messages.push({ format: 'omm-csv', fields, line });
  }
  return messages;
}

function cellsOf(row: string): string[] {
  const cells = [...row.matchAll(/(?:^|,)(?:"((?:[^"]|"")*)"|([^,]*))/g)];
  return cells.map(([, quotedCell, plain]) => quotedCell?.replaceAll('""', '"') ?? plain ?? '');
}
