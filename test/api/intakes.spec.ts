import type { IntakeView } from '@app/contracts';
import ExcelJS from 'exceljs';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { longWorkbook, scatter } from '../support/shift-workbook';

type Headers = { authorization: string };

describe('intakes', () => {
  let app: TestApp;
  let plant: TestPlant;
  let workbook: Buffer;
  const as = {} as Record<'engineer' | 'engineer2' | 'manager' | 'lead' | 'director' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
    plant = await insertPlant(app.database);
    await insertPlan(app.database, plant, plant.channels[0]);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['engineer', 'engineer2', 'manager', 'lead', 'director'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'engineer@overdale.example');
    const lots = Array.from({ length: 36 }, (_, index) => ({
      number: String(24001 + index),
      startsAt: new Date(Date.UTC(2026, 2, 8) + index * 7_200_000).toISOString(),
      values: scatter(index === 30 ? 61 : 60, 12, 0.3, index + 1),
    }));
    workbook = await longWorkbook(lots);
  });
  afterAll(() => app.close());

  const upload = (bytes: Buffer, headers: Headers = as.engineer, name = 'coater 2.xlsx') =>
    app.http.post(`/api/lines/${plant.lines[0].id}/intakes`).set(headers).attach('file', bytes, name);
  const read = async (id: number) =>
    (await app.http.get(`/api/intakes/${id}`).set(as.director).expect(200)).body as IntakeView;
  async function until(id: number, state: string): Promise<IntakeView> {
    const end = Date.now() + 60_000;
    for (;;) {
      const intake = await read(id);
      if (intake.state === state) return intake;
      if (Date.now() > end) throw new Error(`${intake.state}, not ${state}: ${intake.failure}`);
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  }

  it('go from upload over confirmation to verdicts, a hold, mails and audit entries', async () => {
    const received = (await upload(workbook).expect(201)).body as IntakeView;
    expect(received).toMatchObject({
      state: 'needs_attention',
      fileName: 'coater 2.xlsx',
      layout: 'long',
      rowsRead: 432,
      rowsNotUsed: 0,
      isConfirmable: true,
      sameFileAs: null,
      problems: [],
    });
    expect(received.lots).toHaveLength(36);
    expect(received.firstRows[0]).toMatchObject({
      lot: '24001',
      channelName: 'Coat weight',
      unit: 'g/m²',
      at: '2026-03-08T00:00:00.000Z',
    });
    const confirmed = await app.http.post(`/api/intakes/${received.id}/confirm`).set(as.engineer).expect(200);
    expect(['queued', 'working', 'scored']).toContain(confirmed.body.state);
    const scored = await until(received.id, 'scored');
    expect(scored).toMatchObject({
      rowsRead: 432,
      rowsUsed: 432,
      rowsAlreadyThere: 0,
      rowsNotUsed: 0,
      readingsStored: 432,
      confirmedBy: 'engineer',
    });
    expect(scored.outcome?.lotsScored).toBe(36);
    expect(scored.outcome?.lotsHeld.map((lot) => lot.lotNumber)).toContain('24031');
    const { rows: audit } = await app.database.raw<{ rows: { action: string }[] }>(
      `select action from audit_entries where thing_kind = 'intake' and thing_id = ? order by id`,
      [received.id],
    );
    expect(audit.map((entry) => entry.action)).toEqual(['upload', 'read', 'confirm', 'store', 'score']);
    const mails = await app.database<{ kind: string; recipient: string }>('outbox').where({ kind: 'held-lots' });
    expect(mails.map((mail) => mail.recipient).sort()).toEqual(
      ['engineer', 'engineer2', 'lead', 'manager'].map((name) => `${name}@marrowby.example`).sort(),
    );
  });

  it('that bring the same file again say so and change nothing', async () => {
    const before = await app.database('readings').count<{ count: number }[]>();
    const again = (await upload(workbook, as.engineer2).expect(201)).body as IntakeView;
    expect(again.sameFileAs).toMatchObject({ receivedBy: 'engineer' });
    await app.http.post(`/api/intakes/${again.id}/confirm`).set(as.engineer2).expect(200);
    expect(await until(again.id, 'scored')).toMatchObject({
      rowsUsed: 0,
      rowsAlreadyThere: 432,
      rowsNotUsed: 0,
      readingsStored: 0,
      readingsAlreadyThere: 432,
    });
    expect(await app.database('readings').count()).toEqual(before);
  });

  it('cannot be confirmed twice, nor while they are refused', async () => {
    const [first] = (await app.http.get(`/api/lines/${plant.lines[0].id}/intakes?pageSize=1`).set(as.lead).expect(200))
      .body.items;
    expectProblem(await app.http.post(`/api/intakes/${first.id}/confirm`).set(as.engineer), 409, 'confirmed-already');
    const refused = (await upload(Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex')).expect(201))
      .body as IntakeView;
    expect(refused).toMatchObject({ state: 'refused', isConfirmable: false, failure: expect.stringMatching(/\.$/) });
    expectProblem(await app.http.post(`/api/intakes/${refused.id}/confirm`).set(as.engineer), 409, 'refused');
    expectProblem(await app.http.get(`/api/intakes/${refused.id}/workbook`).set(as.engineer), 409, 'not-read');
  });

  it('name a problem with sheet and cell, and give the workbook back with the cell marked', async () => {
    const workbookWithHole = new ExcelJS.Workbook();
    const sheet = workbookWithHole.addWorksheet('Shift');
    sheet.addRow(['Time', 'Lot', 'Product', 'Channel', 'Value']);
    sheet.addRow(['2026-03-11T08:00:00', '24100', 'SEP-16', 'Coat weight', 60.1]);
    sheet.addRow(['2026-03-11T08:10:00', '24100', 'SEP-16', 'No such channel', 60.1]);
    const received = (await upload(Buffer.from(await workbookWithHole.xlsx.writeBuffer())).expect(201))
      .body as IntakeView;
    expect(received).toMatchObject({ rowsRead: 2, rowsNotUsed: 1, isConfirmable: true });
    expect(received.problems).toEqual([
      expect.objectContaining({ sheet: 'Shift', row: 3, column: 'D', detail: expect.stringMatching(/\.$/) }),
    ]);
    const marked = await app.http
      .get(`/api/intakes/${received.id}/workbook`)
      .set(as.lead)
      .buffer()
      .parse((answer, done) => {
        const chunks: Buffer[] = [];
        answer.on('data', (chunk: Buffer) => chunks.push(chunk));
        answer.on('end', () => done(null, Buffer.concat(chunks)));
      });
    expect(marked.status).toBe(200);
    const back = new ExcelJS.Workbook();
    await back.xlsx.load(marked.body);
    expect(back.getWorksheet('Shift')?.getCell('D3').note).toBeTruthy();
  });

  it('tell their progress as an event stream that ends', async () => {
    const [latest] = (
      await app.http.get(`/api/lines/${plant.lines[0].id}/intakes?pageSize=50`).set(as.lead)
    ).body.items.filter((item: { state: string }) => item.state === 'scored');
    const { text, headers } = await app.http.get(`/api/intakes/${latest.id}/events`).set(as.lead).expect(200);
    expect(headers['content-type']).toContain('text/event-stream');
    expect(text).toContain('"stage":"done"');
  });

  it('are closed to other roles, other plants and nobody', async () => {
    const [{ id }] = (await app.http.get(`/api/lines/${plant.lines[0].id}/intakes`).set(as.lead).expect(200)).body
      .items;
    expectProblem(await upload(workbook, as.lead), 403, 'forbidden');
    expectProblem(await upload(workbook, as.director), 403, 'forbidden');
    expectProblem(await upload(workbook, as.stranger), 404, 'not-found');
    for (const path of [
      `intakes/${id}`,
      `intakes/${id}/events`,
      `intakes/${id}/workbook`,
      `lines/${plant.lines[0].id}/intakes`,
    ]) {
      expectProblem(await app.http.get(`/api/${path}`).set(as.stranger), 404, 'not-found');
      expect((await app.http.get(`/api/${path}`)).status).toBe(401);
    }
    expectProblem(await app.http.post(`/api/intakes/${id}/confirm`).set(as.lead), 403, 'forbidden');
    expectProblem(await app.http.post(`/api/intakes/${id}/confirm`).set(as.stranger), 404, 'not-found');
    expect((await app.http.post(`/api/intakes/${id}/confirm`)).status).toBe(401);
  });

  it('need a file of a bearable size', async () => {
    expectProblem(await app.http.post(`/api/lines/${plant.lines[0].id}/intakes`).set(as.engineer), 400, 'file-missing');
    expectProblem(await upload(Buffer.alloc(31 * 1024 * 1024)), 413, 'file-too-large');
    expectProblem(await app.http.get('/api/intakes/abc').set(as.engineer), 400, 'invalid-id');
    expect((await app.http.get(`/api/lines/${plant.lines[0].id}/intakes?page=0`).set(as.engineer)).status).toBe(400);
  });
});
