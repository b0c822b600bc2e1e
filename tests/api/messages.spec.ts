/** Messages about a contact: who may read and write them, files, and what is new to whom. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addSoldContact } from './harness/sold-contact.js';
import { antennaOnSale } from './harness/stations.js';
import { tleText } from './harness/tle.js';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

const HOUR_MS = 3_600_000;
let skyberth: Skyberth;
let operator: Person;
let owner: Person;
let bookingId: string;
beforeAll(async () => {
  skyberth = await startSkyberth();
  [operator, owner] = [await skyberth.people.operator(), await skyberth.people.owner()];
  const { antenna } = await antennaOnSale(skyberth, owner);
  const text = tleText({ name: 'KNOT 7', catalogNumber: 92_007, epochMs: skyberth.clock.nowMs() - HOUR_MS });
  const saved = await must(skyberth.call(routes.saveElements, { body: { text }, as: operator }));
  const spacecraftId = saved.spacecraft[0]?.id ?? '';
  const aosMs = skyberth.clock.nowMs() + 2 * HOUR_MS;
  bookingId = addSoldContact(skyberth, { operator, owner, antennaId: antenna.id, spacecraftId, aosMs }).booking;
});
afterAll(() => skyberth.stop());

const send = (text: string, as: Person, fileIds: string[] = []) =>
  skyberth.call(routes.sendMessage, { params: { id: bookingId }, body: { text, fileIds }, as });
const list = async (as: Person) =>
  (await must(skyberth.call(routes.listMessages, { params: { id: bookingId }, as }))).items;
const newFor = async (as: Person) => (await must(skyberth.call(routes.home, { as }))).counts['messages'];

describe('messages', () => {
  it('are for the two sides and admins alone', async () => {
    const stranger = await skyberth.people.owner();
    expect((await send('Ahoy.', stranger)).problem?.code).toBe('not-found');
    expect((await skyberth.call(routes.listMessages, { params: { id: bookingId }, as: stranger })).problem?.code).toBe(
      'not-found',
    );
    expect((await send('   ', operator)).problem?.code).toBe('bad-input');
    const finance = await skyberth.people.staff('finance');
    expect((await send('Ahoy.', finance)).problem?.code).toBe('not-allowed');
  });

  it('reach the other side by page and mail, and are new until they are read', async () => {
    const sent = await must(send('Which polarisation do you expect?', operator));
    expect(await newFor(owner)).toBe(1);
    expect(await newFor(operator)).toBe(0);
    expect(await list(owner)).toMatchObject([
      { side: 'operator', isNew: true, text: 'Which polarisation do you expect?' },
    ]);
    await skyberth.drain();
    expect(skyberth.mail.to(owner.email).some(({ text }) => text.includes('Which polarisation'))).toBe(true);
    const body = { messageId: sent.id };
    const stranger = await skyberth.people.owner();
    const params = { id: bookingId };
    expect((await skyberth.call(routes.readMessages, { params, body, as: stranger })).problem?.code).toBe('not-found');
    await must(skyberth.call(routes.readMessages, { params, body, as: owner }));
    expect(await newFor(owner)).toBe(0);
    const answer = await must(send('Right-hand.', owner));
    expect(await newFor(operator)).toBe(1);
    await must(skyberth.call(routes.readMessages, { params, body: { messageId: answer.id }, as: operator }));
    // An earlier message does not make a later one new again.
    await must(skyberth.call(routes.readMessages, { params, body, as: operator }));
    expect(await newFor(operator)).toBe(0);
    const threads = await must(skyberth.call(routes.listThreads, { query: {}, as: owner }));
    expect(threads.items).toMatchObject([{ bookingId, lastText: 'Right-hand.', newCount: 0 }]);
    const onlyNew = await must(skyberth.call(routes.listThreads, { query: { only: 'new' }, as: owner }));
    expect(onlyNew).toMatchObject({ items: [], total: 0 });
  });

  it('carry files that the other side may read and strangers may not, and never somebody else’s file', async () => {
    const upload = (as: Person) =>
      must(skyberth.call(routes.uploadFile, { query: { name: 'plot.pdf' }, body: Buffer.from('%PDF-1.7 plot'), as }));
    const file = await upload(operator);
    expect((await skyberth.call(routes.downloadFile, { params: { id: file.id }, as: owner })).problem?.code).toBe(
      'not-found',
    );
    expect((await send('Mine?', owner, [file.id])).problem?.code).toBe('not-found');
    const sent = await must(send('The plot.', operator, [file.id]));
    expect(sent.files).toMatchObject([{ name: 'plot.pdf' }]);
    expect((await skyberth.call(routes.downloadFile, { params: { id: file.id }, as: owner })).status).toBe(200);
    const stranger = await skyberth.people.operator();
    expect((await skyberth.call(routes.downloadFile, { params: { id: file.id }, as: stranger })).problem?.code).toBe(
      'not-found',
    );
  });

  it('keep a programme that runs wild from flooding the other side', async () => {
    const answers = await Promise.all(Array.from({ length: 30 }, (_none, index) => send(`line ${index}`, owner)));
    expect(answers.filter(({ problem }) => problem === undefined).length).toBeLessThanOrEqual(20);
    expect(answers.some(({ problem }) => problem?.code === 'too-many')).toBe(true);
  });
});
