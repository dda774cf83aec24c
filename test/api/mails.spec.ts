import { insertMails, type OutboxMail } from '@app/data';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

const AT = new Date('2026-03-11T11:00:00Z');

describe('the mails of a plant', () => {
  let app: TestApp;
  let plant: TestPlant;
  let other: TestPlant;
  let admin: { authorization: string };
  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    other = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    admin = await signIn(app, 'admin@marrowby.example');
  });
  afterAll(() => app.close());
  beforeEach(async () => {
    await app.database('outbox_attachments').delete();
    await app.database('outbox').delete();
  });

  let events = 0;
  async function insert(mail: Partial<OutboxMail> = {}, row: object = {}, plantId = plant.id): Promise<number> {
    const whole = {
      kind: 'held-lots',
      recipient: 'lead@marrowby.example',
      subject: 'Lot 24118 held',
      html: '<p>x</p>',
    };
    const [id] = await app.database.transaction((tx) =>
      insertMails(tx, plantId, [{ event: `e-${++events}`, text: 'x', ...whole, ...mail }], AT),
    );
    // In an hour, so that the worker of another program would leave it alone.
    await app
      .database('outbox')
      .where({ id })
      .update({ next_attempt_at: new Date('2026-03-11T13:00:00Z'), ...row });
    return id;
  }
  const SENT = { state: 'sent', sent_at: AT, attempts: 1 };
  const FAILED = { state: 'failed', attempts: 30, last_error: '550 no such mailbox' };
  const get = (path: string, headers = admin) => app.http.get(`/api${path}`).set(headers);
  const sendAgain = (id: number, headers = admin) => app.http.post(`/api/mails/${id}/send-again`).set(headers);

  it('are listed newest first with what became of each, counted, and filtered by state and kind', async () => {
    const sent = await insert({}, SENT);
    const failed = await insert({ kind: 'decision' }, FAILED);
    const waiting = await insert({}, { attempts: 2, last_error: 'connection refused' });
    await insert({}, {}, other.id);
    const { body } = await get(`/plants/${plant.id}/mails`).expect(200);
    expect(body).toMatchObject({
      total: 3,
      page: 1,
      counts: { waiting: 1, sent: 1, failed: 1 },
      kinds: ['decision', 'held-lots'],
    });
    expect(body.items.map(({ id }: { id: number }) => id)).toEqual([waiting, failed, sent]);
    expect(body.items[0]).toEqual({
      id: waiting,
      kind: 'held-lots',
      recipient: 'lead@marrowby.example',
      subject: 'Lot 24118 held',
      state: 'waiting',
      createdAt: '2026-03-11T11:00:00.000Z',
      sentAt: null,
      attempts: 2,
      nextAttemptAt: '2026-03-11T13:00:00.000Z',
      lastError: 'connection refused',
    });
    expect(body.items[1]).toMatchObject({ state: 'failed', nextAttemptAt: null, lastError: '550 no such mailbox' });
    const filtered = await get(`/plants/${plant.id}/mails?state=failed&kind=decision`).expect(200);
    expect(filtered.body).toMatchObject({ total: 1, items: [{ id: failed }], counts: { sent: 1 } });
    expect((await get(`/plants/${plant.id}/mails?page=2&pageSize=2`)).body.items).toHaveLength(1);
    expectProblem(await get(`/plants/${plant.id}/mails?state=lost`), 400, 'invalid-input');
  });

  it('can be read whole, with inline pictures as data and the names of attachments', async () => {
    const id = await insert({ html: '<img src="cid:chart">', text: 'the week' }, SENT);
    const attach = (file_name: string, media_type: string, content_id: string | null, bytes: Buffer) =>
      app.database('outbox_attachments').insert({ outbox_id: id, file_name, media_type, content_id, bytes });
    await attach('chart.png', 'image/png', 'chart', Buffer.from([1, 2, 3]));
    await attach('week.xlsx', 'application/vnd.ms-excel', null, Buffer.alloc(10));
    const { body } = await get(`/mails/${id}`).expect(200);
    expect(body).toMatchObject({
      id,
      plantId: plant.id,
      text: 'the week',
      html: '<img src="data:image/png;base64,AQID">',
      isPrivate: false,
      attachments: [
        { name: 'chart.png', mediaType: 'image/png', bytes: 3, isInline: true },
        { name: 'week.xlsx', mediaType: 'application/vnd.ms-excel', bytes: 10, isInline: false },
      ],
      maySendAgain: true,
      history: [],
    });
  });

  it('show nobody else the link that lets a person in', async () => {
    const id = await insert({ kind: 'password-reset', html: 'http://x/secret', text: 'http://x/secret' }, SENT);
    const response = await get(`/mails/${id}`).expect(200);
    expect(response.body).toMatchObject({ isPrivate: true, text: null, html: null });
    expect(response.text).not.toContain('secret');
  });

  it('that were given up are tried anew, audited', async () => {
    const id = await insert({}, FAILED);
    const { body } = await sendAgain(id).expect(202);
    expect(body).toEqual({ id });
    expect((await get(`/mails/${id}`)).body).toMatchObject({
      state: 'waiting',
      attempts: 0,
      nextAttemptAt: '2026-03-11T12:00:00.000Z',
      maySendAgain: false,
      history: [{ by: 'admin', sentence: 'admin had the mail “Lot 24118 held” to lead@marrowby.example sent again' }],
    });
    const entry = await app.database('audit_entries').where({ action: 'send-mail-again', thing_id: id }).first();
    expect(entry).toMatchObject({
      plant_id: plant.id,
      actor_id: plant.people.admin.id,
      before: { state: 'failed', attempts: 30, lastError: '550 no such mailbox' },
    });
  });

  it('that were sent go out as a copy with an event of its own and the same attachments', async () => {
    const id = await insert({}, SENT);
    await app.database('outbox_attachments').insert({
      outbox_id: id,
      file_name: 'week.xlsx',
      media_type: 'application/vnd.ms-excel',
      bytes: Buffer.from('week'),
    });
    const { body } = await sendAgain(id).expect(202);
    expect(body.id).not.toBe(id);
    const [old, copy] = await app.database('outbox').orderBy('id');
    expect(old).toMatchObject({ id, state: 'sent' });
    expect(copy).toMatchObject({
      id: body.id,
      event: `again-${id}-1`,
      state: 'waiting',
      attempts: 0,
      subject: old.subject,
    });
    expect(copy.message_id).not.toBe(old.message_id);
    const attached = await app.database('outbox_attachments').where({ outbox_id: copy.id });
    expect(attached.map(({ bytes }: { bytes: Buffer }) => bytes.toString())).toEqual(['week']);
    expectProblem(await sendAgain(id), 409, 'mail-waiting');
    await app.database('outbox').where({ id: copy.id }).update(SENT);
    await sendAgain(id).expect(202);
    expect(await app.database('outbox').where({ event: `again-${id}-2` })).toHaveLength(1);
  });

  it('that wait already are not sent twice', async () => {
    const id = await insert();
    expectProblem(await sendAgain(id), 409, 'mail-waiting');
    const failed = await insert({}, FAILED);
    const answers = await Promise.all([sendAgain(failed), sendAgain(failed)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([202, 409]);
  });

  it.each(['engineer', 'manager', 'technician', 'lead', 'director'])('are nothing for %s', async (name) => {
    const headers = await signIn(app, `${name}@marrowby.example`);
    const id = await insert({}, SENT);
    expectProblem(await get(`/plants/${plant.id}/mails`, headers), 403, 'forbidden');
    expectProblem(await get(`/mails/${id}`, headers), 403, 'forbidden');
    expectProblem(await sendAgain(id, headers), 403, 'forbidden');
  });

  it('of another plant are not there, nor any without a sign-in', async () => {
    const id = await insert({}, SENT, other.id);
    expectProblem(await get(`/plants/${other.id}/mails`), 404, 'not-found');
    for (const unknown of [id, 999_999]) {
      expectProblem(await get(`/mails/${unknown}`), 404, 'not-found');
      expectProblem(await sendAgain(unknown), 404, 'not-found');
    }
    expect(await app.database('outbox').where({ id }).first('state')).toEqual({ state: 'sent' });
    expectProblem(await app.http.get(`/api/plants/${plant.id}/mails`), 401, 'not-signed-in');
    expectProblem(await app.http.post(`/api/mails/${id}/send-again`), 401, 'not-signed-in');
    expectProblem(await get('/mails/x'), 400, 'invalid-id');
  });
});
