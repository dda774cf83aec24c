import { expectProblem } from '../support/expect-problem';
import { startTestApp, type TestApp } from '../support/app';
import { insertPerson, signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';
import { insertShift, type TestShift } from '../support/factories/shift';

type Headers = { authorization: string };

describe('plants and lines', () => {
  let app: TestApp;
  let shift: TestShift;
  let overdale: TestPlant;
  let director: Headers;
  beforeAll(async () => {
    app = await startTestApp();
    shift = await insertShift(app);
    overdale = await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    await insertPerson(app.database, { email: 'nobody@marrowby.example' });
    director = await signIn(app, 'director@marrowby.example');
  });
  afterAll(() => app.close());

  const get = (path: string, headers: Headers = director) => app.http.get(`/api${path}`).set(headers);

  it('lists the plants where one is somebody', async () => {
    const { body } = await get('/plants').expect(200);
    expect(body).toEqual({
      items: [{ id: shift.plant.id, name: 'Marrowby Works', timeZone: 'Europe/London' }],
      total: 1,
      page: 1,
      pageSize: 1,
    });
    const nobody = await get('/plants', await signIn(app, 'nobody@marrowby.example')).expect(200);
    expect(nobody.body.items).toEqual([]);
  });

  it('lists the lines with their count of held lots', async () => {
    const { body } = await get(`/plants/${shift.plant.id}/lines`).expect(200);
    const [coater, calender] = shift.plant.lines;
    expect(body.items).toEqual([
      { id: calender.id, name: 'Calender 1', plantId: shift.plant.id, heldCount: 0 },
      { id: coater.id, name: 'Coater 2', plantId: shift.plant.id, heldCount: 1 },
    ]);
  });

  it('shows the line strip by shifts, a night shift whole across midnight', async () => {
    const [coater, calender] = shift.plant.lines;
    const { body } = await get(`/lines/${coater.id}/strip`).expect(200);
    expect(body).toMatchObject({
      line: { id: coater.id, name: 'Coater 2' },
      plant: { name: 'Marrowby Works', timeZone: 'Europe/London' },
      otherLines: [{ id: calender.id, heldCount: 0 }],
    });
    const shifts = body.shifts as { name: string; startsAt: string; endsAt: string; lots: { number: string }[] }[];
    expect(
      shifts.map(({ name, startsAt, endsAt, lots }) => [name, startsAt, endsAt, lots.map((lot) => lot.number)]),
    ).toEqual([
      ['late', '2026-03-10T14:00:00.000Z', '2026-03-10T22:00:00.000Z', ['24117']],
      ['night', '2026-03-10T22:00:00.000Z', '2026-03-11T06:00:00.000Z', ['24118', '24119']],
      ['early', '2026-03-11T06:00:00.000Z', '2026-03-11T14:00:00.000Z', ['24120', '24121']],
    ]);
    expect(body.shifts[1].lots[0]).toMatchObject({
      id: shift.lots['24118'].id,
      mark: { controlState: 'outside_control_limits', holdState: 'open' },
    });
    expect((await get(`/lines/${calender.id}/strip`).expect(200)).body.shifts).toEqual([]);
  });

  it("answer another plant's line as one that is not there", async () => {
    for (const path of [`/plants/${overdale.id}/lines`, `/lines/${overdale.lines[0].id}/strip`, '/lines/999999/strip'])
      expectProblem(await get(path), 404, 'not-found');
  });

  it('need a sign-in and a number', async () => {
    expectProblem(await app.http.get('/api/plants'), 401, 'not-signed-in');
    expectProblem(await app.http.get(`/api/plants/${shift.plant.id}/lines`), 401, 'not-signed-in');
    expectProblem(await app.http.get(`/api/lines/${shift.plant.lines[0].id}/strip`), 401, 'not-signed-in');
    expectProblem(await get('/plants/first/lines'), 400, 'invalid-id');
    expectProblem(await get('/lines/-1/strip'), 400, 'invalid-id');
  });
});
