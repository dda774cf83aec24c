import { Workbook } from 'exceljs';
import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';
import { insertPerson, signIn } from '../support/factories/people';
import { insertPlant } from '../support/factories/plant';
import { insertShift, type TestShift } from '../support/factories/shift';

type Headers = { authorization: string };

describe('lots', () => {
  let app: TestApp;
  let shift: TestShift;
  let director: Headers;
  let stranger: Headers;
  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    await insertPerson(app.database, { email: 'nobody@marrowby.example' });
    director = await signIn(app, 'director@marrowby.example');
    stranger = await signIn(app, 'manager@overdale.example');
  });
  afterAll(() => app.close());

  const get = (path: string, headers: Headers = director) => app.http.get(`/api${path}`).set(headers);
  const numbers = async (query: string, headers = director) => {
    const { body } = await get(`/lots?${query}`, headers).expect(200);
    return (body.items as { number: string }[]).map((lot) => lot.number);
  };

  it('are listed newest first, with mark, hold and the channel on which each stands out most', async () => {
    const { body } = await get('/lots').expect(200);
    expect(body).toMatchObject({ total: 5, page: 1, pageSize: 50 });
    expect(body.items.map((lot: { number: string }) => lot.number)).toEqual([
      '24121',
      '24120',
      '24119',
      '24118',
      '24117',
    ]);
    expect(body.items[3]).toEqual({
      id: shift.lots['24118'].id,
      number: '24118',
      line: { id: shift.plant.lines[0].id, name: 'Coater 2' },
      product: 'SEP-16',
      quantity: 500,
      quantityUnit: 'm',
      startsAt: '2026-03-10T23:00:00.000Z',
      endsAt: '2026-03-11T01:00:00.000Z',
      mark: {
        controlState: 'outside_control_limits',
        isProvisional: false,
        specificationState: 'inside_specification',
        hasNotice: false,
        holdState: 'open',
        disposition: null,
        isExcluded: false,
      },
      farthest: { channelId: shift.plant.channels[0].id, channelName: 'Coat weight', score: -4.3 },
      hold: { id: shift.holds.open, state: 'open', openedAt: '2026-03-11T08:48:00.000Z' },
      disposition: null,
    });
    expect(body.items[1]).toMatchObject({ farthest: null, hold: null, mark: { controlState: 'not_scored' } });
  });

  it.each([
    ['state=held', ['24118']],
    ['state=outside', ['24121', '24119', '24118']],
    ['state=not_scored', ['24120']],
    ['state=released', ['24119']],
    ['state=scrapped', ['24121']],
    ['state=within_control_limits', ['24117']],
    ['state=outside_specification', []],
    ['held=open', ['24118']],
    ['held=decided', ['24121', '24119']],
    ['held=never', ['24120', '24117']],
    ['from=2026-03-10T23:00:00Z&to=2026-03-11T06:30:00Z', ['24119', '24118']],
    ['by=ended&from=2026-03-11T01:00:00Z&to=2026-03-11T02:00:00Z', ['24118']],
    ['by=held&to=2026-03-11T08:49:00Z', ['24118']],
    ['by=open', ['24118']],
    ['disposition=release', ['24119']],
    ['by=decided&disposition=scrap', ['24121']],
    ['text=4117', ['24117']],
    ['text=sep-1&state=held', ['24118']],
    ['text=%25', []],
    ['sort=startsAt&pageSize=2&page=2', ['24119', '24120']],
    ['sort=-score', ['24121', '24118', '24119', '24117', '24120']],
    ['sort=number&pageSize=1', ['24117']],
  ])('are found by %s', async (query, expected) => {
    expect(await numbers(query)).toEqual(expected);
  });

  it('of another line are not those of the chosen line', async () => {
    expect(await numbers(`lineId=${shift.plant.lines[1].id}`)).toEqual([]);
    expect(await numbers(`lineId=${shift.plant.lines[0].id}`)).toHaveLength(5);
  });

  it('come as a workbook with the same rows', async () => {
    const response = await get('/lots?format=xlsx&state=held')
      .responseType('blob')
      .expect(200)
      .expect('content-disposition', 'attachment; filename="lots.xlsx"');
    const book = new Workbook();
    await book.xlsx.load(response.body as never);
    const sheet = book.worksheets[0];
    expect(sheet.rowCount).toBe(2);
    const row = (sheet.getRow(2).values as unknown[]).slice(1);
    expect(row).toEqual([
      '24118',
      'Coater 2',
      'SEP-16',
      new Date('2026-03-10T23:00:00Z'),
      new Date('2026-03-11T01:00:00Z'),
      500,
      'm',
      'outside control limits',
      'settled',
      'inside specification',
      'Coat weight',
      -4.3,
      'open',
    ]);
  });

  it('of other plants show to nobody who is nobody there', async () => {
    expect(await numbers('', stranger)).toEqual([]);
    expect(await numbers('', await signIn(app, 'nobody@marrowby.example'))).toEqual([]);
    expectProblem(await get(`/lots?lineId=${shift.plant.lines[0].id}`, stranger), 404, 'not-found');
    expectProblem(await get(`/lots?plantId=${shift.plant.id}`, stranger), 404, 'not-found');
    expectProblem(await get(`/lots/${shift.lots['24117'].id}`, stranger), 404, 'not-found');
  });

  it('that do not exist answer as those of another plant do', async () => {
    const missing = await get('/lots/999999');
    const foreign = await get(`/lots/${shift.lots['24117'].id}`, stranger);
    expect(missing.body.detail).toBe(foreign.body.detail);
    expectProblem(missing, 404, 'not-found');
  });

  it('need a sign-in', async () => {
    expectProblem(await app.http.get('/api/lots'), 401, 'not-signed-in');
    expectProblem(await app.http.get('/api/lots/1'), 401, 'not-signed-in');
  });

  it.each([
    ['state=gone', '/state'],
    ['page=0', '/page'],
    ['pageSize=10000', '/pageSize'],
    ['sort=colour', '/sort'],
    ['from=yesterday', '/from'],
    ['to=2026-02-30', '/to'],
    ['lineId=x', '/lineId'],
    ['lineId=99999999999999999999', '/lineId'],
    ['by=colour', '/by'],
    ['disposition=gone', '/disposition'],
    ['notScoredOn=x', '/notScoredOn'],
    ['notScoredFor=%3Cb%3E', '/notScoredFor'],
    ['anything=else', '/anything'],
  ])('refuse %s with a pointer to it', async (query, pointer) => {
    const response = await get(`/lots?${query}`);
    expectProblem(response, 400, 'invalid-input');
    expect(response.body.errors[0]).toMatchObject({ pointer });
  });

  it('are shown whole: verdicts, holds and history', async () => {
    await app.database('audit_entries').insert({
      plant_id: shift.plant.id,
      at: new Date('2026-03-11T10:00:00Z'),
      actor_id: shift.plant.people.manager.id,
      actor_name: 'manager',
      action: 'release',
      thing_kind: 'hold',
      thing_id: shift.holds.released,
      sentence: 'manager released lot 24119.',
    });
    const { body } = await get(`/lots/${shift.lots['24119'].id}`).expect(200);
    expect(body).toMatchObject({
      number: '24119',
      plantId: shift.plant.id,
      disposition: 'release',
      hold: { id: shift.holds.released, state: 'decided' },
      holds: [{ id: shift.holds.released, state: 'decided', openedAt: '2026-03-11T08:49:00.000Z' }],
      history: [{ at: '2026-03-11T10:00:00.000Z', by: 'manager', sentence: 'manager released lot 24119.' }],
    });
    expect(body.verdicts).toHaveLength(1);
    expect(body.verdicts[0]).toMatchObject({
      channel: {
        name: 'Coat weight',
        characteristic: { name: 'Coat weight', unit: 'g/m²', resolution: 0.01 },
        gaugeAssetNumber: 'BG-204',
      },
      controlState: 'outside_control_limits',
      notScoredSentence: null,
      score: 3.4,
      limit: 3,
      nominal: 60,
      constant: { state: 'within_control_limits', low: 59, high: 61, score: 0.2 },
      signals: [
        {
          signal: 'lot_mean',
          action: 'holds',
          sentence: 'lies 3.4\u202fσ above its baseline in coat weight (control limit 3.0\u202fσ)',
        },
      ],
      planRevision: 1,
      methodVersion: '1',
    });
    expect(body.verdicts[0].lowerSpecification).toBeCloseTo(58.8, 10);
  });

  it('say in words why they are not scored', async () => {
    const { body } = await get(`/lots/${shift.lots['24120'].id}`).expect(200);
    expect(body.verdicts[0].notScoredSentence).toContain('still learning');
  });

  it('refuse an address that is no number', async () => {
    expectProblem(await get('/lots/abc'), 400, 'invalid-id');
    expectProblem(await get('/lots/99999999999999999999'), 400, 'invalid-id');
  });
});
