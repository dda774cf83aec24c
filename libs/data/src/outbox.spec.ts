import {
  insertMails,
  leaseMail,
  listDueMailIds,
  listOutboxAttachments,
  type OutboxMail,
  updateMailFailed,
  updateMailLease,
  updateMailLeasesEnded,
  updateMailSent,
} from './outbox';
import { openPlantDatabase, type PlantDatabase } from './testing/plant-database';

const AT = new Date('2026-03-11T14:20:00Z');
const after = (seconds: number) => new Date(AT.getTime() + seconds * 1000);

describe('mails that wait', () => {
  let place: PlantDatabase;
  beforeAll(async () => {
    place = await openPlantDatabase();
  });
  afterAll(() => place.close());
  beforeEach(() => place.reset());

  const mail = (differs: Partial<OutboxMail> = {}): OutboxMail => ({
    event: 'intake-7-line-1',
    kind: 'held-lots',
    recipient: 'lead@marrowby.example',
    subject: 'Lot 24117 is held: "coat weight"',
    html: '<p>§ ≥ 4.3 σ</p>',
    text: 'lies 4.3 σ below',
    ...differs,
  });
  const insert = (...mails: OutboxMail[]) => place.db.transaction((tx) => insertMails(tx, place.plant.id, mails, AT));
  const due = (now: Date) => listDueMailIds(place.db, now, 100);

  it('are one an event, recipient and kind, however often they are written', async () => {
    const ids = await insert(mail(), mail({ recipient: 'engineer@marrowby.example' }));
    expect(ids).toHaveLength(2);
    expect(await insert(mail(), mail({ subject: 'again' }))).toEqual([]);
    expect(await insert(mail({ kind: 'decision' }), mail({ event: 'intake-8-line-1' }))).toHaveLength(2);
    expect(await insert()).toEqual([]);
  });

  it('carry what goes with them, each its own, written once', async () => {
    const chart = {
      fileName: 'week.png',
      mediaType: 'image/png',
      contentId: 'chart',
      bytes: Buffer.from([137, 80, 0, 255]),
    };
    const book = { fileName: 'week.xlsx', mediaType: 'application/zip', contentId: null, bytes: Buffer.from('PK') };
    const write = (...mails: OutboxMail[]) =>
      place.db.transaction((tx) => insertMails(tx, place.plant.id, mails, AT, [chart, book]));
    const ids = await write(mail(), mail({ recipient: 'engineer@marrowby.example' }));
    expect(await write(mail())).toEqual([]);
    for (const id of ids) expect(await listOutboxAttachments(place.db, id)).toEqual([chart, book]);
    const [bare] = await insert(mail({ kind: 'decision' }));
    expect(await listOutboxAttachments(place.db, bare)).toEqual([]);
  });

  it('are one also when two transactions write them at once', async () => {
    const both = await Promise.all([insert(mail()), insert(mail())]);
    expect(both.flat()).toHaveLength(1);
  });

  it('have a Message-ID each that no other installation has', async () => {
    const [id] = await insert(mail());
    const first = (await leaseMail(place.db, id, AT, 20))?.messageId;
    expect(first).toMatch(/^<[0-9a-f-]{36}@ebbline>$/);
    await place.reset();
    const [same] = await insert(mail());
    expect((await leaseMail(place.db, same, AT, 20))?.messageId).not.toBe(first);
  });

  it('are not there when their event’s transaction is rolled back', async () => {
    const failing = place.db.transaction(async (tx) => {
      await insertMails(tx, place.plant.id, [mail()], AT);
      throw new Error('the power fails');
    });
    await expect(failing).rejects.toThrow('the power fails');
    expect(await due(AT)).toEqual([]);
  });

  it('go to one sender at a time, with all that the mail says, and count the attempt', async () => {
    const [id] = await insert(mail());
    const leases = await Promise.all([1, 2, 3].map(() => leaseMail(place.db, id, AT, 20)));
    const taken = leases.filter((lease) => lease !== undefined);
    expect(taken).toEqual([{ id, ...mail(), messageId: expect.any(String), attempts: 1 }]);
    expect(await due(AT)).toEqual([]);
  });

  it('are due again when a lease has run out, not before, under the same Message-ID', async () => {
    const [id] = await insert(mail());
    const first = await leaseMail(place.db, id, AT, 20);
    expect(await due(after(19))).toEqual([]);
    expect(await leaseMail(place.db, id, after(19), 20)).toBeUndefined();
    expect(await due(after(20))).toEqual([id]);
    expect(await leaseMail(place.db, id, after(20), 20)).toMatchObject({ messageId: first?.messageId, attempts: 2 });
  });

  it('stay with a sender that keeps its lease up', async () => {
    const [id] = await insert(mail());
    await leaseMail(place.db, id, AT, 20);
    await updateMailLease(place.db, id, after(15), 20);
    expect(await due(after(34))).toEqual([]);
    expect(await due(after(35))).toEqual([id]);
  });

  it('get no lease from one that comes too late to keep it up', async () => {
    const [id] = await insert(mail());
    await leaseMail(place.db, id, AT, 20);
    await updateMailSent(place.db, id, after(1));
    await updateMailLease(place.db, id, after(2), 20);
    expect(await place.db('outbox')).toMatchObject([{ state: 'sent', sent_at: after(1), leased_until: null }]);
  });

  it('are free at once when every lease is taken back', async () => {
    const [id, other] = await insert(mail(), mail({ kind: 'decision' }));
    await leaseMail(place.db, id, AT, 20);
    await updateMailFailed(place.db, other, 'no route', after(60));
    await updateMailLeasesEnded(place.db);
    expect(await due(AT)).toEqual([id]);
  });

  it('wait as long as they are put off, and keep the reason', async () => {
    const [id] = await insert(mail());
    await leaseMail(place.db, id, AT, 20);
    await updateMailFailed(place.db, id, 'greylisted', after(40));
    expect(await due(after(39))).toEqual([]);
    expect(await due(after(40))).toEqual([id]);
    expect(await place.db('outbox').first('last_error', 'state')).toEqual({
      last_error: 'greylisted',
      state: 'waiting',
    });
  });

  it('are never sent again once they are sent or given up', async () => {
    const [sent, failed] = await insert(mail(), mail({ kind: 'decision' }));
    await updateMailSent(place.db, sent, AT);
    await updateMailFailed(place.db, failed, 'no such person', null);
    await updateMailFailed(place.db, sent, 'too late', after(5));
    expect(await due(after(86_400))).toEqual([]);
    expect(await leaseMail(place.db, sent, after(99), 20)).toBeUndefined();
    expect(await leaseMail(place.db, failed, after(99), 20)).toBeUndefined();
    expect(await place.db('outbox').orderBy('id').pluck('state')).toEqual(['sent', 'failed']);
  });
});
