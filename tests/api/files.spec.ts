/** Files: what is taken, who may read them, and when they go. */
import { existsSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { openDatabase } from '@skyberth/drizzle';
import { FILE_LIMITS } from '@skyberth/shared';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

let skyberth: Skyberth;
let operator: Person;
beforeAll(async () => {
  skyberth = await startSkyberth();
  operator = await skyberth.people.operator();
});
afterAll(() => skyberth.stop());

const PAPER = Buffer.from('%PDF-1.7\nan invented licence');
const upload = (body: Uint8Array, name = 'licence.pdf', as = operator) =>
  skyberth.call(routes.uploadFile, { query: { name }, body, as });
const download = (id: string, as: Person) => skyberth.call(routes.downloadFile, { params: { id }, as });
/** Hours pass; the session goes on. */
const later = async (hours: number) => {
  skyberth.clock.advance(hours * 3_600_000);
  await must(skyberth.call(routes.refresh, { as: operator }));
};
const shelf = () => join(dirname(skyberth.databaseFile), 'files');
const stored = () =>
  existsSync(shelf())
    ? readdirSync(shelf(), { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile())
    : [];

describe('an upload', () => {
  it.each([
    ['a page', '<!doctype html><script>x()</script>'],
    ['a drawing', '<svg onload="x()"/>'],
    ['a program', '\u007fELF\u0002'],
  ])('is refused for %s, whatever it is called', async (_what, text) => {
    const before = stored().length;
    expect((await upload(Buffer.from(text))).problem).toMatchObject({ status: 422, code: 'file-refused' });
    expect(stored()).toHaveLength(before);
  });

  it('is refused when empty, too large, of a viewer, or in another media type', async () => {
    expect((await upload(Buffer.alloc(0))).problem?.code).toBe('bad-input');
    const large = Buffer.alloc(FILE_LIMITS.bytes + 1, 0x61);
    expect((await upload(large, 'a.txt')).problem).toMatchObject({ status: 413, code: 'too-large' });
    const viewer = await skyberth.people.member(operator, 'viewer');
    expect((await upload(PAPER, 'a.pdf', viewer)).problem?.code).toBe('not-allowed');
    const headers = { 'Content-Type': 'text/html' };
    const other = await skyberth.call(routes.uploadFile, { query: { name: 'a' }, body: PAPER, headers, as: operator });
    expect(other.problem?.code).toBe('bad-input');
  });

  it('is refused once the organisation’s room is used up', async () => {
    const full = await skyberth.people.operator();
    const { id } = await must(upload(PAPER, 'a.pdf', full));
    const file = openDatabase(skyberth.databaseFile).$client;
    const row = file.prepare('SELECT * FROM files WHERE id = ?').get(id) as Record<string, unknown>;
    const big = { ...row, id: `${id.slice(0, -1)}x`, bytes: FILE_LIMITS.organisationBytes - PAPER.length };
    file
      .prepare(
        'INSERT INTO files VALUES (@id, @organisation_id, @name, @media_type, @bytes, @sha256, @created_by, @created_ms)',
      )
      .run(big);
    file.close();
    expect((await upload(PAPER, 'b.pdf', full)).problem).toMatchObject({ status: 413, code: 'too-large' });
  });

  it('keeps a clean name and comes back byte for byte, to be saved and never shown', async () => {
    const file = await must(upload(PAPER, '../a\u202Eb/Größe.exe'));
    expect(file).toMatchObject({ name: 'Größe.exe.pdf', mediaType: 'application/pdf', bytes: PAPER.length });
    const { headers, body } = await download(file.id, operator);
    expect(body).toEqual(PAPER);
    expect(headers.get('content-disposition')).toBe(
      `attachment; filename="Gr__e.exe.pdf"; filename*=UTF-8''Gr%C3%B6%C3%9Fe.exe.pdf`,
    );
    expect(headers.get('content-type')).toBe('application/octet-stream');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('content-security-policy')).toContain('sandbox');
  });

  it('is seen by its own organisation alone until it is attached', async () => {
    const { id } = await must(upload(PAPER));
    const colleague = await skyberth.people.member(operator, 'viewer');
    expect((await download(id, colleague)).ok).toBe(true);
    for (const stranger of [
      await skyberth.people.operator(),
      await skyberth.people.owner(),
      await skyberth.people.staff('admin'),
    ]) {
      expect((await download(id, stranger)).problem?.code).toBe('not-found');
    }
  });

  it('that no longer has its bytes is refused instead of given out', async () => {
    const { id } = await must(upload(Buffer.from('%PDF-1.7 to be harmed')));
    const all = stored().map((entry) => join(entry.parentPath, entry.name));
    const harmed = all.at(-1) ?? '';
    for (const place of all) writeFileSync(place, 'something else');
    expect((await download(id, operator)).problem).toMatchObject({ status: 503, code: 'unavailable' });
    rmSync(harmed);
  });
});

describe('what nobody attaches', () => {
  it('goes after a day, its bytes only when no other upload has the same', async () => {
    const body = Buffer.from('%PDF-1.7 twice the same');
    const first = await must(upload(body));
    await later(23);
    const second = await must(upload(body));
    await later(2);
    await skyberth.runJobs();
    expect((await download(first.id, operator)).problem?.code).toBe('not-found');
    expect((await download(second.id, operator)).body).toEqual(body);
    await later(24);
    await skyberth.runJobs();
    expect((await download(second.id, operator)).problem?.code).toBe('not-found');
    expect(stored()).toEqual([]);
  });
});

describe('the database', () => {
  it('lets no file change, and none go that is attached', async () => {
    const { id } = await must(upload(PAPER));
    const file = openDatabase(skyberth.databaseFile).$client;
    expect(() => file.prepare(`UPDATE files SET name = 'x' WHERE id = ?`).run(id)).toThrow('a file never changes');
    file.prepare(`INSERT INTO file_links VALUES (?, 'test', 'subject', 1)`).run(id);
    expect(() => file.prepare('DELETE FROM files WHERE id = ?').run(id)).toThrow('attached');
    expect(() => file.prepare('DELETE FROM file_links WHERE file_id = ?').run(id)).toThrow('stays attached');
    file.close();
  });
});
