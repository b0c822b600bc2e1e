import { readFileSync } from 'node:fs';

/** Rows of a comma table in `tests/reference/data`, numbers by column name. */
export function readTable(path: string): Record<string, number>[] {
  const [head = '', ...rows] = readFileSync(new URL(`../data/${path}`, import.meta.url), 'utf8')
    .trim()
    .split('\n');
  const names = head.split(',');
  return rows.map((row) => {
    const cells = row.split(',');
    return Object.fromEntries(names.map((name, index) => [name, Number(cells[index])]));
  });
}
