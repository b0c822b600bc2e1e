/** One pass, many buyers: through the API, and from several processes on the same database file. */
import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { routes } from '@skyberth/shared';
import Database from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { elementsAt, openShop, RADIO, type Shop, wishFor } from '../api/harness/shop.js';
import { must, type Person } from '../api/harness.js';

let shop: Shop;
beforeAll(async () => {
  shop = await openShop({ antenna: { minNoticeMin: 0 } });
});
afterAll(() => shop?.stop());

const call: Shop['skyberth']['call'] = (route, input) => shop.skyberth.call(route, input);

/** Another operator whose spacecraft flies in formation with the first one: it has the same passes. */
async function rival(): Promise<{ person: Person; spacecraftId: string }> {
  const person = await shop.skyberth.people.operator();
  const body = { name: 'Twin', shortName: 'TW', catalogNumber: 70_001, radios: [RADIO] };
  const { id } = await must(call(routes.createSpacecraft, { body, as: person }));
  const [own] = await must(
    call(routes.listElements, { params: { id: shop.spacecraftId }, query: {}, as: shop.operator }),
  ).then(({ items }) => items);
  const text = elementsAt(Date.parse(own?.epochUtc ?? ''), 70_001, 70_001 % 360);
  await must(call(routes.saveElements, { body: { text, spacecraftId: id }, as: person }));
  return { person, spacecraftId: id };
}

describe('fifty attempts at the same pass', () => {
  it('of one organisation make one hold', async () => {
    const body = await wishFor(shop.skyberth, shop.passes.at(-1)!, shop.operator);
    const answers = await Promise.all(
      Array.from({ length: 50 }, () => call(routes.holdBerth, { body, as: shop.operator })),
    );
    expect(answers.filter((answer) => answer.ok)).toHaveLength(1);
    const codes = new Set(answers.flatMap((answer) => answer.problem?.code ?? []));
    expect([...codes].every((code) => code === 'berth-taken' || code === 'spacecraft-busy')).toBe(true);
  });

  it('of five organisations make one hold', async () => {
    const rivals = await Promise.all(Array.from({ length: 5 }, rival));
    const pass = shop.passes.at(-3)!;
    const wish = await wishFor(shop.skyberth, pass, shop.operator);
    const answers = await Promise.all(
      Array.from({ length: 50 }, (_none, index) => {
        const { person, spacecraftId } = rivals[index % rivals.length]!;
        return call(routes.holdBerth, { body: { ...wish, spacecraftId }, as: person });
      }),
    );
    const refused = answers.flatMap((answer) => answer.problem?.code ?? []);
    expect(
      answers.filter((answer) => answer.ok),
      JSON.stringify(answers[0]?.problem),
    ).toHaveLength(1);
    expect(refused.every((code) => code === 'berth-taken' || code === 'spacecraft-busy')).toBe(true);
  });

  it('with every beam free but one antenna of two beams make two holds', async () => {
    const rivals = await Promise.all(Array.from({ length: 4 }, rival));
    const params = { id: shop.antennaId };
    const antenna = await must(call(routes.getAntenna, { params, as: shop.owner }));
    await must(call(routes.updateAntenna, { params, body: { ...antenna, beams: 2 }, as: shop.owner }));
    const wish = await wishFor(shop.skyberth, shop.passes.at(-5)!, shop.operator);
    const answers = await Promise.all(
      rivals.map(({ person, spacecraftId }) => call(routes.holdBerth, { body: { ...wish, spacecraftId }, as: person })),
    );
    expect(answers.filter((answer) => answer.ok)).toHaveLength(2);
  });
});

/** A process of its own that tries to write the same hold again and again, in turn with the others. */
const RACER = `
import Database from 'better-sqlite3';
const [file, id, startAt] = process.argv.slice(1);
const db = new Database(file, { timeout: 5000 });
const row = db.prepare('SELECT * FROM bookings WHERE id = ?').get(id);
const columns = Object.keys(row);
const insert = db.prepare('INSERT INTO bookings (' + columns.join(',') + ') VALUES (' + columns.map(() => '?').join(',') + ')');
while (Date.now() < Number(startAt)) {}
let won = 0;
for (let attempt = 0; attempt < 40; attempt += 1) {
  try {
    db.transaction(() => {
      const number = db.prepare('SELECT max(number) + 1 AS next FROM bookings').get().next;
      const copy = { ...row, id: process.pid + '-' + attempt, number, state: 'held' };
      insert.run(...columns.map((column) => copy[column]));
    }).immediate();
    won += 1;
  } catch (error) {
    if (!/berth-taken|spacecraft-busy/.test(String(error))) throw error;
  }
}
console.log(won);
`;

describe('processes on the same database file', () => {
  it('write one hold between them, because the database refuses the others', async () => {
    const held = await shop.hold(shop.passes.at(-7)!);
    await must(call(routes.letGo, { params: { id: held.id }, as: shop.operator }));
    const run = promisify(execFile);
    const startAt = String(Date.now() + 1_000);
    const args = ['--input-type=module', '-e', RACER, shop.skyberth.databaseFile, held.id, startAt];
    const results = await Promise.all(Array.from({ length: 3 }, () => run(process.execPath, args)));
    expect(results.map(({ stdout }) => Number(stdout)).reduce((sum, won) => sum + won, 0)).toBe(1);
    const db = new Database(shop.skyberth.databaseFile, { readonly: true });
    const { rows } = db
      .prepare("SELECT count(*) AS rows FROM bookings WHERE state = 'held' AND aos_ms = ?")
      .get(Date.parse(held.aosUtc)) as { rows: number };
    db.close();
    expect(rows).toBe(1);
  });
});
