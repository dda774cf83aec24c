import type { IntakeView, LayoutView } from '@app/contracts';
import ExcelJS from 'exceljs';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };

describe('what is answered about a workbook', () => {
  let app: TestApp;
  let plant: TestPlant;
  const as = {} as Record<'engineer' | 'manager' | 'lead' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
    plant = await insertPlant(app.database);
    await insertPlan(app.database, plant, plant.channels[0]);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['engineer', 'manager', 'lead'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'engineer@overdale.example');
  });
  afterAll(() => app.close());

  /** "Mass per area" is no name that the line knows; hour by hour from six in the morning, on the plant's clocks. */
  async function strangeWorkbook(day: string, lot: string): Promise<Buffer> {
    const book = new ExcelJS.Workbook();
    const sheet = book.addWorksheet('Lab');
    sheet.addRow(['Time', 'Lot', 'Product', 'Mass per area']);
    for (let hour = 6; hour < 12; hour++)
      sheet.addRow([`${day}T${String(hour).padStart(2, '0')}:00:00`, lot, 'SEP-16', 60 + hour / 100]);
    return Buffer.from(await book.xlsx.writeBuffer());
  }
  const upload = async (bytes: Buffer, headers = as.engineer) =>
    (
      await app.http
        .post(`/api/lines/${plant.lines[0].id}/intakes`)
        .set(headers)
        .attach('file', bytes, 'lab.xlsx')
        .expect(201)
    ).body as IntakeView;
  const answer = (id: number, answers: object, headers = as.engineer) =>
    app.http.post(`/api/intakes/${id}/reading`).set(headers).send({ answers });
  const layouts = async () =>
    (await app.http.get(`/api/lines/${plant.lines[0].id}/layouts`).set(as.lead).expect(200)).body as LayoutView[];
  const column = () => ({
    sheets: { Lab: { columns: { D: { role: 'channel_values', channelId: plant.channels[0].id } } } },
  });

  it('is read by, shown, and remembered for the next workbook with that header once it is confirmed', async () => {
    const received = await upload(await strangeWorkbook('2026-03-09', '24100'));
    expect(received.isConfirmable).toBe(false);
    const read = (await answer(received.id, column()).expect(200)).body as IntakeView;
    expect(read).toMatchObject({ state: 'needs_attention', isConfirmable: true, rowsRead: 6, rowsNotUsed: 0 });
    expect(read.answers).toEqual(column());
    expect(read.firstRows[0]).toMatchObject({ lot: '24100', channelName: 'Coat weight', value: 60.06 });
    expect(read.grids[0]).toMatchObject({ sheet: 'Lab', headerRow: 1, isRemembered: false });
    expect(await layouts()).toEqual([]);
    await app.http.post(`/api/intakes/${read.id}/confirm`).set(as.engineer).expect(200);
    expect(await layouts()).toEqual([
      expect.objectContaining({
        sheetName: 'Lab',
        rememberedBy: 'engineer',
        answers: ['Column D: values of Coat weight.'],
      }),
    ]);
    const next = await upload(await strangeWorkbook('2026-03-10', '24101'), as.manager);
    expect(next).toMatchObject({ isConfirmable: true, rowsNotUsed: 0 });
    expect(next.grids[0]).toMatchObject({ isRemembered: true });
  });

  it('is forgotten when somebody says so', async () => {
    const [{ id }] = await layouts();
    await app.http.delete(`/api/lines/${plant.lines[0].id}/layouts/${id}`).set(as.manager).expect(204);
    expect(await layouts()).toEqual([]);
    expect((await upload(await strangeWorkbook('2026-03-11', '24102'))).isConfirmable).toBe(false);
  });

  it('is refused where it cannot be understood, field by field', async () => {
    const { id } = await upload(await strangeWorkbook('2026-03-08', '24099'));
    const wrong = {
      sheets: {
        Lab: { columns: { D: { role: 'weather' }, '7': { role: 'lot' } }, timeZone: 'Mars/Base', headerRow: 0 },
      },
      date: '2026-02-30',
      colour: 'red',
    };
    const refused = await answer(id, wrong);
    expectProblem(refused, 400, 'answers-not-understood');
    expect((refused.body.errors as { pointer: string }[]).map(({ pointer }) => pointer).sort()).toEqual([
      '/answers/colour',
      '/answers/date',
      '/answers/sheets/Lab/columns/7',
      '/answers/sheets/Lab/columns/D/role',
      '/answers/sheets/Lab/headerRow',
      '/answers/sheets/Lab/timeZone',
    ]);
    expectProblem(await app.http.post(`/api/intakes/${id}/reading`).set(as.engineer).send({}), 400, 'invalid-input');
    expect(((await app.http.get(`/api/intakes/${id}`).set(as.lead)).body as IntakeView).answers).toEqual({});
  });

  it('comes too late when the workbook is confirmed', async () => {
    const received = await upload(await strangeWorkbook('2026-03-07', '24098'));
    await answer(received.id, column()).expect(200);
    await app.http.post(`/api/intakes/${received.id}/confirm`).set(as.engineer).expect(200);
    expectProblem(await answer(received.id, {}), 409, 'confirmed-already');
  });

  it('may be said by who may upload, at the plant', async () => {
    const { id } = await upload(await strangeWorkbook('2026-03-06', '24097'));
    expectProblem(await answer(id, {}, as.lead), 403, 'forbidden');
    expectProblem(await answer(id, {}, as.stranger), 404, 'not-found');
    expectProblem(await app.http.get(`/api/lines/${plant.lines[0].id}/layouts`).set(as.stranger), 404, 'not-found');
  });

  it('is not needed for the blank workbook of the line', async () => {
    const blank = await app.http
      .get(`/api/lines/${plant.lines[0].id}/workbook-template`)
      .set(as.lead)
      .buffer()
      .parse((response, done) => {
        const chunks: Buffer[] = [];
        response.on('data', (chunk: Buffer) => chunks.push(chunk));
        response.on('end', () => done(null, Buffer.concat(chunks)));
      })
      .expect(200);
    expect(blank.headers['content-disposition']).toContain('Coater%202%20readings.xlsx');
    const book = new ExcelJS.Workbook();
    await book.xlsx.load(blank.body);
    const [sheet] = book.worksheets;
    const heads = (sheet.getRow(1).values as string[]).slice(1);
    expect(heads.slice(0, 5)).toEqual(['Time', 'Lot', 'Product', 'Quantity', 'Coat weight [g/m²]']);
    sheet.addRow([new Date('2026-03-05T06:00:00Z'), '24096', 'SEP-16', 1200, 60.2]);
    const filled = await upload(Buffer.from(await book.xlsx.writeBuffer()));
    expect(filled).toMatchObject({ isConfirmable: true, rowsRead: 1, rowsNotUsed: 0, layout: 'wide' });
    expect(filled.firstRows[0]).toMatchObject({
      lot: '24096',
      quantity: 1200,
      channelName: 'Coat weight',
      value: 60.2,
    });
  });
});
