import { createTestDatabase, type TestDatabase } from '../../../test/support/database';
import { insertRow } from '../../../test/support/factories/insert';
import { insertPlant, type TestPlant } from '../../../test/support/factories/plant';
import { createDatabase, type Database } from './database';
import { getLineContext } from './line-context';
import { insertSpecificationVersion } from './set-up-specifications';

describe('what a line’s workbooks may name', () => {
  let test: TestDatabase;
  let db: Database;
  let plant: TestPlant;
  beforeAll(async () => {
    test = await createTestDatabase();
    db = createDatabase(test.url);
    plant = await insertPlant(db);
  });
  afterAll(async () => {
    await db.destroy();
    await test.drop();
  });

  const specifications = async () =>
    Object.fromEntries(
      (await getLineContext(db, plant.lines[0].id)).channels.map((one) => [one.name, one.specifications]),
    );

  it('comes with the specification of each product, in its newest version', async () => {
    expect(await specifications()).toEqual({
      'Coat weight': [{ product: 'SEP-16', nominal: 60, lower: 58.8, upper: 61.2 }],
      'Web thickness': [{ product: 'SEP-16', nominal: 25, lower: 24.2, upper: 25.8 }],
    });
    const [{ characteristicId }] = plant.channels;
    const another = await insertRow(db, 'products', { plant_id: plant.id, code: 'SEP-12', name: 'Separator 12' });
    const version = {
      plantId: plant.id,
      characteristicId,
      appliesToIndividuals: true,
      validFrom: new Date('2026-01-02T00:00:00Z'),
      proposedBy: plant.people.engineer.id,
      approvedBy: plant.people.manager.id,
      approvedAt: new Date('2026-01-01T00:00:00Z'),
    };
    await db.transaction(async (tx) => {
      await insertSpecificationVersion(tx, {
        ...version,
        productId: plant.productId,
        nominal: 60.1,
        lower: 58.9,
        upper: null,
      });
      await insertSpecificationVersion(tx, { ...version, productId: another, nominal: 45, lower: 44, upper: 46 });
    });
    expect((await specifications())['Coat weight']).toEqual([
      { product: 'SEP-12', nominal: 45, lower: 44, upper: 46 },
      { product: 'SEP-16', nominal: 60.1, lower: 58.9, upper: null },
    ]);
  });

  it('leaves out the specifications of products that are retired', async () => {
    await db('products')
      .where({ code: 'SEP-16' })
      .update({ retired_at: new Date('2026-01-03T00:00:00Z') });
    expect((await specifications())['Web thickness']).toEqual([]);
  });
});
