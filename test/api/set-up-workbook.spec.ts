import { Workbook } from 'exceljs';
import type { SetUpWorkbookView } from '@app/contracts';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertRow } from '../support/factories/insert';
import { insertLot, insertIntake, insertReadings } from '../support/factories/lots';
import { signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };
type Edit = (book: Workbook) => void;

const TABLES = ['lines', 'shifts', 'products', 'characteristics', 'specification_proposals', 'gauges', 'channels'];

describe('the set-up as a workbook', () => {
  let app: TestApp;
  let plant: TestPlant;
  let whole: Buffer;
  const as = {} as Record<'admin' | 'manager' | 'engineer' | 'director' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['admin', 'manager', 'engineer', 'director'] as const)
      as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'admin@overdale.example');
    whole = await download(as.admin);
  });
  afterAll(() => app.close());

  const path = (plantId = plant.id) => `/api/plants/${plantId}/set-up/workbook`;
  async function download(headers: Headers, plantId = plant.id): Promise<Buffer> {
    const answer = await app.http.get(path(plantId)).set(headers).buffer(true).responseType('blob').expect(200);
    expect(answer.headers['content-disposition']).toMatch(/^attachment; filename\*=UTF-8''Set-up%20of%20/);
    return answer.body as Buffer;
  }
  async function edited(edit: Edit, bytes = whole): Promise<Buffer> {
    const book = new Workbook();
    await book.xlsx.load(bytes as unknown as ArrayBuffer);
    edit(book);
    return Buffer.from(await book.xlsx.writeBuffer());
  }
  const send = (bytes: Buffer, confirm: string, headers: Headers = as.admin, plantId = plant.id) =>
    app.http
      .post(`${path(plantId)}?confirm=${confirm}`)
      .set(headers)
      .attach('file', bytes, 'set-up.xlsx');
  const look = async (bytes: Buffer, plantId = plant.id, headers = as.admin): Promise<SetUpWorkbookView> =>
    (await send(bytes, 'no', headers, plantId).expect(200)).body as SetUpWorkbookView;
  const cell = (book: Workbook, sheet: string, name: string) => book.getWorksheet(sheet)!.getCell(name);
  const row = (book: Workbook, sheet: string, number: number, values: unknown[]) =>
    (book.getWorksheet(sheet)!.getRow(number).values = values as never);
  /** How many rows each table has, and how much was audited. */
  async function counts(): Promise<number[]> {
    const found = await Promise.all(
      [...TABLES, 'people', 'audit_entries', 'outbox'].map((name) => app.database(name).count()),
    );
    return found.map(([{ count }]) => Number(count));
  }

  it('changes nothing when it comes back as it went out', async () => {
    const before = await counts();
    const view = await look(whole);
    expect(view).toMatchObject({ isApplied: false, problems: [], notices: [], changes: [], changeCount: 0 });
    expect(view.summary).toEqual([
      '1 plant unchanged.',
      '3 shifts unchanged.',
      '2 lines unchanged.',
      '1 product unchanged.',
      '2 characteristics unchanged.',
      '2 specifications unchanged.',
      '2 gauges unchanged.',
      '2 channels unchanged.',
      '7 people unchanged.',
    ]);
    const applied = (await send(whole, 'yes').expect(200)).body as SetUpWorkbookView;
    expect(applied).toMatchObject({ isApplied: true, changeCount: 0 });
    expect(await counts()).toEqual(before);
  });

  it('says what would change and does not do it, then does all of it, with an entry each', async () => {
    const before = await counts();
    const bytes = await edited((book) => {
      cell(book, 'Plant', 'C2').value = 'GBP';
      row(book, 'Lines', 4, ['Slitter 4']);
      cell(book, 'Products', 'C2').value = 0.42;
      row(book, 'Products', 3, ['SEP-20', 'Separator 20']);
      row(book, 'Characteristics', 4, ['Nip force', 'kN', 0.1]);
      cell(book, 'Specifications', 'E2').value = 61.5;
      cell(book, 'Specifications', 'G2').value = null;
      row(book, 'Specifications', 4, ['SEP-20', 'Nip force', 12, 11, 13, 'no', new Date('2026-03-01T06:00:00Z')]);
      row(book, 'Gauges', 4, ['LC-9', 'load cell']);
      row(book, 'Channels', 4, [
        'Slitter 4',
        'Nip force',
        'Nip force',
        'nip',
        'LC-9',
        new Date('2026-03-01T06:00:00Z'),
      ]);
    });
    const view = await look(bytes);
    expect(view.problems).toEqual([]);
    expect(view.changes).toEqual([
      'Plant changes: Currency from none to "GBP".',
      'Line "Slitter 4" is added.',
      'Product "SEP-16" changes: Value per unit from none to 0.42.',
      'Product "SEP-20" is added.',
      'Characteristic "Nip force" is added.',
      'Specification "SEP-16", "Coat weight" is proposed anew: Upper specification limit from 61.2 to 61.5, Valid from from 2020-01-01 00:00 to the import on. It holds once a second person has approved it.',
      'Specification "SEP-20", "Nip force" is proposed, and holds once a second person has approved it.',
      'Gauge "LC-9" is added.',
      'Channel "Slitter 4", "Nip force" is added.',
    ]);
    expect(view.summary).toContain('1 line added, 2 unchanged.');
    expect(await counts()).toEqual(before);

    expect((await send(bytes, 'yes').expect(200)).body).toMatchObject({ isApplied: true, changeCount: 9 });
    const entries = await app.database('audit_entries').where({ plant_id: plant.id }).orderBy('id', 'desc').limit(10);
    expect(entries.every((entry) => entry.actor_id === plant.people.admin.id)).toBe(true);
    expect(entries[0].sentence).toMatch(/^admin applied the set-up in set-up\.xlsx\. 1 plant changed\. /);
    expect(
      entries
        .slice(1)
        .map((entry) => entry.thing_kind)
        .sort(),
    ).toEqual([
      'channel',
      'characteristic',
      'gauge',
      'line',
      'plant',
      'product',
      'product',
      'specification_proposal',
      'specification_proposal',
    ]);
    const proposals = await app.database('specification_proposals').orderBy('id');
    expect(
      proposals.map(({ upper, state, proposed_by, valid_from }) => ({ upper, state, proposed_by, valid_from })),
    ).toEqual([
      { upper: 61.5, state: 'proposed', proposed_by: plant.people.admin.id, valid_from: app.clock.now() },
      {
        upper: 13,
        state: 'proposed',
        proposed_by: plant.people.admin.id,
        valid_from: new Date('2026-03-01T06:00:00Z'),
      },
    ]);
    expect(await look(bytes)).toMatchObject({ problems: [], changes: [] });
    expect(await look(await download(as.admin))).toMatchObject({ problems: [], changes: [] });
  });

  it('applies nothing when one cell is wrong, and names it', async () => {
    const before = await counts();
    const bytes = await edited((book) => {
      row(book, 'Lines', 5, ['Winder 1']);
      cell(book, 'Products', 'C2').value = 'dear';
      cell(book, 'Channels', 'A2').value = 'Coater two';
    });
    const expected = [
      {
        sheet: 'Products',
        cell: 'C2',
        code: 'not-a-number',
        what: 'Value per unit says "dear", which is no number.',
        whatToDo: 'Write a number without its unit.',
      },
      {
        sheet: 'Channels',
        cell: 'A2',
        code: 'unknown-reference',
        what: 'The line "Coater two" is not on the sheet Lines.',
        whatToDo: 'Add a row for it there, or name one that is there.',
      },
    ];
    expect(await look(bytes)).toMatchObject({ problems: expected, summary: [], changes: [] });
    const refused = await send(bytes, 'yes');
    expectProblem(refused, 422, 'set-up-workbook-problems');
    expect(refused.body.errors).toEqual([
      { pointer: '/Products/C2', code: 'not-a-number', detail: `${expected[0].what} ${expected[0].whatToDo}` },
      { pointer: '/Channels/A2', code: 'unknown-reference', detail: `${expected[1].what} ${expected[1].whatToDo}` },
    ]);
    expect(await counts()).toEqual(before);
  });

  it('names the cells that only the plant as it is refuses, all at once, and applies nothing', async () => {
    const current = await download(as.admin);
    await app.database('lines').insert({ plant_id: plant.id, name: 'Old coater', retired_at: app.clock.now() });
    const intakeId = await insertIntake(app.database, plant);
    const lot = await insertLot(app.database, plant, { number: '25001', startsAt: new Date('2026-03-04T06:00:00Z') });
    await insertReadings(app.database, plant, { channel: plant.channels[0], lot, intakeId }, [60, 60.1, 59.9]);
    const before = await counts();
    const bytes = await edited((book) => {
      cell(book, 'Plant', 'A2').value = 'Overdale';
      cell(book, 'Shifts', 'C2').value = '13:30';
      cell(book, 'Shifts', 'B3').value = '13:30';
      row(book, 'Lines', 5, ['Old coater']);
      row(book, 'Lines', 6, ['Winder 1']);
      cell(book, 'Characteristics', 'B2').value = 'kg/m²';
      cell(book, 'Specifications', 'C3').value = 25.1;
      cell(book, 'Specifications', 'D4').value = 10.5;
      for (const name of ['C2', 'C3', 'C4', 'C5', 'C6', 'C7', 'C8']) {
        const roles = cell(book, 'People', name);
        if (roles.text === 'administrator') roles.value = 'line lead';
      }
      cell(book, 'Channels', 'C2').value = 'Web thickness';
      cell(book, 'Channels', 'D2').value = 'B';
      cell(book, 'Channels', 'F3').value = new Date('2030-01-01T00:00:00Z');
      row(book, 'Channels', 5, ['Winder 1', 'Coat weight', 'Coat weight', 'exit']);
    }, current);
    const { problems, changes } = await look(bytes);
    expect(problems.map(({ sheet, cell: name, code }) => `${sheet}!${name} ${code}`)).toEqual([
      'Plant!A2 name-taken',
      'Shifts!D2 shifts-in-use',
      'Lines!A5 retired',
      'Characteristics!B2 unit-in-use',
      'Specifications!G3 valid-from-kept',
      'Specifications!B4 proposal-pending',
      'Channels!C2 characteristic-kept',
      'Channels!F3 since-kept',
      'Channels!E5 gauge-missing',
      'People!C2 last-administrator',
    ]);
    for (const { what, whatToDo } of problems) for (const said of [what, whatToDo]) expect(said).toMatch(/^\w.*\.$/);
    expect(changes).toContain('Line "Winder 1" is added.');
    expectProblem(await send(bytes, 'yes'), 422, 'set-up-workbook-problems');
    expect(await counts()).toEqual(before);
    const elsewhere = await look(await edited((book) => (cell(book, 'Plant', 'B2').value = 'Europe/Berlin'), current));
    expect(elsewhere.problems).toMatchObject([{ sheet: 'Plant', cell: 'B2', code: 'zone-in-use' }]);
  });

  it('lets another gauge serve a channel, which declares a break where there are readings', async () => {
    await insertRow(app.database, 'gauges', { plant_id: plant.id, asset_number: 'BG-300', kind: 'beta gauge' });
    const bytes = await edited(
      (book) => {
        const channels = book.getWorksheet('Channels')!;
        channels.eachRow((one) => {
          if (one.getCell(2).text !== 'Coat weight') return;
          one.getCell(5).value = 'BG-300';
          one.getCell(6).value = new Date('2026-03-10T06:00:00Z');
        });
      },
      await download(as.admin),
    );
    expect((await send(bytes, 'yes').expect(200)).body.changes).toEqual([
      'Channel "Coater 2", "Coat weight" changes: Gauge from "BG-204" to "BG-300", Gauge since from 2020-01-01 00:00 to 2026-03-10 06:00.',
    ]);
    const breaks = await app.database('breaks').where({ channel_id: plant.channels[0].id });
    expect(breaks).toMatchObject([{ kind: 'gauge_change', at: new Date('2026-03-10T06:00:00Z') }]);
  });

  it('invites who is new, by mail, and changes roles and lines; names stay people’s own', async () => {
    const bytes = await edited(
      (book) => {
        const people = book.getWorksheet('People')!;
        people.eachRow((one) => {
          if (one.getCell(1).text === 'lead@marrowby.example') one.getCell(4).value = 'Coater 2; Calender 1';
          if (one.getCell(1).text === 'director@marrowby.example') one.getCell(2).value = 'D. Rector';
        });
        row(book, 'People', people.actualRowCount + 1, ['Ada@Marrowby.example', 'Ada Kern', 'engineer', 'Calender 1']);
      },
      await download(as.admin),
    );
    const before = await counts();
    const view = await look(bytes);
    expect(view.changes).toEqual([
      'Person "lead@marrowby.example" changes: Lines from Coater 2 to Coater 2, Calender 1.',
      'Person "ada@marrowby.example" is invited.',
    ]);
    expect(view.notices).toMatchObject([{ sheet: 'People', code: 'name-kept' }]);
    expect(await counts()).toEqual(before);
    await send(bytes, 'yes').expect(200);
    const ada = await app.database('people').where({ email: 'ada@marrowby.example' }).first();
    expect(ada).toMatchObject({ name: 'Ada Kern', password_hash: null });
    expect(await app.database('memberships').where({ person_id: ada.id })).toMatchObject([{ role: 'engineer' }]);
    expect(await app.database('line_assignments').where({ person_id: ada.id })).toMatchObject([
      { line_id: plant.lines[1].id },
    ]);
    expect(await app.database('outbox').where({ recipient: 'ada@marrowby.example' })).toHaveLength(1);
    expect(await app.database('line_assignments').where({ person_id: plant.people.lead.id })).toHaveLength(2);
    expect((await look(bytes)).changes).toEqual([]);
  });

  it('is the empty sheets for a new plant, which one workbook sets up', async () => {
    const made = await app.http
      .post('/api/plants')
      .set(as.admin)
      .send({ name: 'Fennick Works', timeZone: 'America/Toronto' })
      .expect(201);
    const plantId = (made.body as { id: number }).id;
    const bytes = await edited(
      (book) => {
        expect(book.worksheets[0].name).toBe('Read this first');
        expect(book.getWorksheet('Lines')!.getCell('A2').value).toBeNull();
        const day = new Date('2026-03-01T00:00:00Z');
        row(book, 'Shifts', 2, ['day', '07:00', '19:00', day]);
        row(book, 'Shifts', 3, ['night', '19:00', '07:00', day]);
        row(book, 'Lines', 2, ['Press 1']);
        row(book, 'Products', 2, ['P-1', 'Plate']);
        row(book, 'Characteristics', 2, ['Torque', 'N·m', 0.01]);
        row(book, 'Specifications', 2, ['P-1', 'Torque', 4, 3.5, null, 'yes']);
        row(book, 'Gauges', 2, ['T-1', 'torque sensor']);
        row(book, 'Channels', 2, ['Press 1', 'Torque', 'Torque', 'spindle', 'T-1', '2026-03-08 03:00']);
      },
      await download(as.admin, plantId),
    );
    expect((await send(bytes, 'yes', as.admin, plantId).expect(200)).body).toMatchObject({
      isApplied: true,
      changeCount: 8,
    });
    const [served] = await app
      .database('channel_gauges')
      .where({ plant_id: plantId })
      .select(app.database.raw('lower(served) as since'));
    expect(served.since).toEqual(new Date('2026-03-08T07:00:00Z'));
    expect((await look(bytes, plantId)).changeCount).toBe(0);
  });

  it('is for administrators of the plant alone', async () => {
    for (const headers of [as.manager, as.engineer, as.director]) {
      expectProblem(await app.http.get(path()).set(headers), 403, 'forbidden');
      expectProblem(await send(whole, 'yes', headers), 403, 'forbidden');
    }
    expectProblem(await app.http.get(path()).set(as.stranger), 404, 'not-found');
    expectProblem(await send(whole, 'yes', as.stranger), 404, 'not-found');
    expect((await app.http.get(path())).status).toBe(401);
    expect((await app.http.post(`${path()}?confirm=yes`)).status).toBe(401);
  });

  it('is refused without a file, with another answer than yes or no, and as a file of another kind', async () => {
    expectProblem(await app.http.post(`${path()}?confirm=no`).set(as.admin), 400, 'file-missing');
    expect((await send(whole, 'perhaps')).status).toBe(400);
    expect((await look(Buffer.from('Lines;Coater 2'))).problems).toMatchObject([
      { sheet: null, cell: null, code: 'not-excel' },
    ]);
    expectProblem(await send(Buffer.from('Lines;Coater 2'), 'yes'), 422, 'set-up-workbook-problems');
  });
});
