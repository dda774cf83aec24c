import { ask, listOperations } from '../support/routes/ask';
import type { Done, Entry, Row, Write } from '../support/routes/row';
import { ROWS } from '../support/routes/rows';
import { openWorld, type World } from '../support/routes/world';

interface Written {
  id: number;
  at: Date;
  plant_id: number | null;
  actor_id: number | null;
  actor_name: string;
  thing_kind: string;
  thing_id: number;
  sentence: string;
  address: string | null;
}
type Recipe = Exclude<Write, { exempt: string }>;

const WRITES = Object.entries(ROWS).filter(([route]) => !route.startsWith('GET '));
const isRecipe = (write?: Write): write is Recipe => write !== undefined && 'by' in write;
const RECIPES = WRITES.filter(([, { write }]) => isRecipe(write)) as [string, Row & { write: Recipe }][];

describe('every write', () => {
  let world: World;
  beforeAll(async () => {
    world = await openWorld();
  });
  afterAll(() => world.app.close());

  const entriesAfter = (id: number) =>
    world.app.database<Written>('audit_entries').where('id', '>', id).orderBy('id').select('*') as Promise<Written[]>;
  const lastEntry = async () => Number((await world.app.database('audit_entries').max('id as id'))[0].id ?? 0);

  it('has a recipe here, or a reason to leave no entry', async () => {
    const operations = await listOperations(world);
    const silent = operations
      .map(({ route }) => route)
      .filter((route) => !route.startsWith('GET ') && !ROWS[route]?.write);
    expect(silent).toEqual([]);
  });

  it('that leaves no entry says why in a sentence', () => {
    const reasons = WRITES.flatMap(([, { write }]) => (write && 'exempt' in write ? [write.exempt] : []));
    expect(reasons.filter((reason) => reason.split(' ').length < 6)).toEqual([]);
  });

  it.each(RECIPES)('by %s leaves its entry: who, what, to what, when and from where', async (route, row) => {
    const { by: role, prepare, entry, also = [] } = row.write;
    const by = world.plant.people[role];
    const asked = prepare ? await prepare(world) : (row.asked?.(world) ?? {});
    const before = await lastEntry();
    const answer = await ask(world, route, row, asked, row.permission === 'public' ? undefined : world.as[role]);
    if (answer.status >= 300) throw new Error(`${answer.status}: ${JSON.stringify(answer.body)}`);
    const written = await entriesAfter(before);
    const done: Done = { asked, answer: answer.body as Record<string, unknown>, by };
    for (const expected of [entry, ...also]) expectEntry(written, expected, done);
  });

  function expectEntry(written: Written[], entry: Entry, done: Done): void {
    const found = written.find(({ sentence }) => entry.sentence.test(sentence));
    if (!found)
      throw new Error(`no entry like ${entry.sentence} among ${JSON.stringify(written.map((e) => e.sentence))}`);
    const thing = entry.thing?.(world, done);
    expect(found).toEqual(
      expect.objectContaining({
        plant_id: entry.plant?.(done) ?? world.plant.id,
        at: world.app.clock.now(),
        thing_kind: entry.kind,
        thing_id: thing ?? expect.any(Number),
        address: expect.stringMatching(/127\.0\.0\.1$/),
      }),
    );
    if (entry.isOfNobody) return;
    expect(found).toMatchObject({ actor_id: done.by.id, actor_name: done.by.name });
    expect(found.sentence).toContain(done.by.name);
  }
});
