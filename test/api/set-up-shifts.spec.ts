import type { ShiftCalendarsView } from '@app/contracts';
import { startTestApp, type TestApp } from '../support/app';
import { expectProblem } from '../support/expect-problem';
import { insertLot } from '../support/factories/lots';
import { signIn } from '../support/factories/people';
import { insertPlant, type TestPlant } from '../support/factories/plant';

type Headers = { authorization: string };

const DAY = [
  { name: 'day', startsAt: '05:00', endsAt: '17:00' },
  { name: 'night', startsAt: '17:00', endsAt: '05:00' },
];

describe('the shift calendar', () => {
  let app: TestApp;
  let plant: TestPlant;
  const as = {} as Record<'admin' | 'engineer' | 'stranger', Headers>;

  beforeAll(async () => {
    app = await startTestApp();
    plant = await insertPlant(app.database);
    await insertPlant(app.database, { name: 'Overdale', domain: 'overdale.example' });
    for (const name of ['admin', 'engineer'] as const) as[name] = await signIn(app, `${name}@marrowby.example`);
    as.stranger = await signIn(app, 'admin@overdale.example');
  });
  afterAll(() => app.close());

  const path = () => `/api/plants/${plant.id}/set-up/shifts`;
  const put = (body: object, headers: Headers = as.admin) => app.http.put(path()).set(headers).send(body);
  const spans = async () =>
    ((await app.http.get(path()).set(as.engineer).expect(200)).body as ShiftCalendarsView).calendars.map(
      ({ validFrom, until, shifts }) => [validFrom, until, shifts.map(({ name }) => name).join(' ')],
    );
  const shiftsOfStrip = async () => {
    const strip = await app.http.get(`/api/lines/${plant.lines[0].id}/strip`).set(as.engineer).expect(200);
    return (strip.body as { shifts: { name: string; startsAt: string }[] }).shifts.map(({ name, startsAt }) => [
      name,
      startsAt,
    ]);
  };

  it('is replaced from a day on: shifts of before keep their meaning', async () => {
    await insertLot(app.database, plant, { number: '1', startsAt: '2026-03-10T15:00:00Z' });
    const { body } = await put({ validFrom: '2026-03-12', shifts: DAY }).expect(200);
    expect((body as ShiftCalendarsView).calendars[0]).toEqual({ validFrom: '2026-03-12', until: null, shifts: DAY });
    expect(await spans()).toEqual([
      ['2026-03-12', null, 'day night'],
      ['2020-01-01', '2026-03-12', 'early late night'],
    ]);
    await insertLot(app.database, plant, { number: '2', startsAt: '2026-03-12T15:00:00Z' });
    await insertLot(app.database, plant, { number: '3', startsAt: '2026-03-13T01:00:00Z' });
    expect(await shiftsOfStrip()).toEqual([
      ['late', '2026-03-10T14:00:00.000Z'],
      ['day', '2026-03-12T05:00:00.000Z'],
      ['night', '2026-03-12T17:00:00.000Z'],
    ]);
    await app.database('lots').whereIn('number', ['2', '3']).delete();
    expect(await app.database('audit_entries').orderBy('id', 'desc').first()).toMatchObject({
      action: 'change-shifts',
      sentence: 'admin set the shifts of Marrowby Works from 2026-03-12 on: day 05:00 to 17:00, night 17:00 to 05:00.',
      before: { calendars: [expect.objectContaining({ validFrom: '2020-01-01', until: null })] },
      after: { validFrom: '2026-03-12', shifts: DAY },
    });
  });

  it('that has not begun is replaced whole, and the same one again changes nothing', async () => {
    const audited = async () => Number((await app.database('audit_entries').count())[0].count);
    const before = await audited();
    await put({ validFrom: '2026-03-12', shifts: [DAY[1], DAY[0]] }).expect(200);
    expect(await audited()).toBe(before);
    await put({ validFrom: '2026-04-01', shifts: [{ name: 'whole', startsAt: '06:00', endsAt: '06:00' }] }).expect(200);
    expect(await spans()).toEqual([
      ['2026-04-01', null, 'whole'],
      ['2026-03-12', '2026-04-01', 'day night'],
      ['2020-01-01', '2026-03-12', 'early late night'],
    ]);
    await put({ validFrom: '2026-03-20', shifts: DAY }).expect(200);
    expect((await spans()).map(([validFrom]) => validFrom)).toEqual(['2026-03-20', '2026-03-12', '2020-01-01']);
  });

  it('is not changed under lots that were made in it', async () => {
    const refused = await put({ validFrom: '2026-03-10', shifts: DAY });
    expectProblem(refused, 409, 'shifts-in-use');
    expect(refused.body).toMatchObject({
      errors: [{ pointer: '/validFrom', detail: expect.stringContaining('2026-03-12 at the earliest') }],
    });
  });

  it('counts the day in the zone of the plant', async () => {
    await app.database('plants').where({ id: plant.id }).update({ time_zone: 'Pacific/Auckland' });
    const refused = await put({ validFrom: '2026-03-10', shifts: DAY });
    // Noon in UTC on the 11th is the 12th there.
    expect((refused.body as { detail: string }).detail).toContain('2026-03-13 at the earliest');
    await app.database('plants').where({ id: plant.id }).update({ time_zone: 'Europe/London' });
  });

  it('may begin at any time before the first lots', async () => {
    await app.database('lots').delete();
    await put({ validFrom: '2019-01-01', shifts: DAY }).expect(200);
    expect(await spans()).toEqual([['2019-01-01', null, 'day night']]);
  });

  it('has shifts that follow each other, each error at its own field', async () => {
    const overlap = await put({
      validFrom: '2026-05-01',
      shifts: [...DAY, { name: 'Day', startsAt: '16:30', endsAt: '18:00' }],
    });
    expectProblem(overlap, 400, 'name-taken');
    expect((overlap.body as { errors: { pointer: string }[] }).errors.map(({ pointer }) => pointer)).toEqual([
      '/shifts/2/name',
      '/shifts/2/startsAt',
    ]);
    const bad = await put({ validFrom: '2026-02-30', shifts: [{ name: '', startsAt: '24:00', endsAt: 6 }] });
    expect(
      [...new Set((bad.body as { errors: { pointer: string }[] }).errors.map(({ pointer }) => pointer))].sort(),
    ).toEqual(['/shifts/0/endsAt', '/shifts/0/name', '/shifts/0/startsAt', '/validFrom']);
    const none = await put({ validFrom: '2026-05-01', shifts: [] });
    expect(none.body).toMatchObject({ errors: [{ pointer: '/shifts', detail: 'Give at least one shift.' }] });
  });

  it('is closed to everybody but administrators of the plant', async () => {
    const body = { validFrom: '2026-05-01', shifts: DAY };
    expectProblem(await put(body, as.engineer), 403, 'forbidden');
    expectProblem(await put(body, as.stranger), 404, 'not-found');
    expect((await app.http.put(path()).send(body)).status).toBe(401);
  });
});
