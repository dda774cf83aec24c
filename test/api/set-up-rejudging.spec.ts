import type { SpecificationSetUpView } from '@app/contracts';
import { WorkerModule } from '../../apps/worker/src/worker.module';
import { startTestApp, type TestApp } from '../support/app';
import { insertIntake, insertLot, insertReadings } from '../support/factories/lots';
import { PASSWORD, signIn } from '../support/factories/people';
import { insertPlan } from '../support/factories/plans';
import { insertPlant } from '../support/factories/plant';
import { scatter } from '../support/shift-workbook';

describe('lots made before a specification was approved', () => {
  let app: TestApp;
  beforeAll(async () => {
    app = await startTestApp({ extraImports: [WorkerModule.register({ isMailing: false })] });
  });
  afterAll(() => app.close());

  it('are judged with it from its time on, and held where they lie outside', async () => {
    const plant = await insertPlant(app.database);
    const [channel] = plant.channels;
    const [engineer, manager] = [
      await signIn(app, 'engineer@marrowby.example'),
      await signIn(app, 'manager@marrowby.example'),
    ];
    await insertPlan(app.database, plant, channel);
    const intakeId = await insertIntake(app.database, plant);
    for (let index = 0; index < 24; index++) {
      const startsAt = new Date(Date.UTC(2026, 2, 9) + index * 7_200_000);
      const lot = await insertLot(app.database, plant, { number: String(25000 + index), startsAt });
      // Within 58.8 to 61.2; the later half lies above 60.2.
      const level = index < 12 ? 60 : 60.5;
      await insertReadings(app.database, plant, { channel, lot, intakeId }, scatter(level, 8, 0.05, index + 7));
    }
    const proposal = await app.http
      .post(`/api/plants/${plant.id}/set-up/specification-proposals`)
      .set(engineer)
      .send({
        productId: plant.productId,
        characteristicId: channel.characteristicId,
        nominal: 60,
        lower: 59.8,
        upper: 60.2,
        appliesToIndividuals: true,
        validFrom: '2026-03-10T06:00:00Z',
        reason: 'The customer asks for less scatter.',
      })
      .expect(201);
    const { id } = (proposal.body as SpecificationSetUpView).proposal!;
    await app.http
      .post(`/api/specification-proposals/${id}/approval`)
      .set(manager)
      .send({ password: PASSWORD })
      .expect(200);
    const end = Date.now() + 60_000;
    const owed = () => app.database('owed_jobs').where({ state: 'owed' });
    while ((await owed()).length > 0 && Date.now() < end) await new Promise((resolve) => setTimeout(resolve, 100));
    const states = await app
      .database('verdicts')
      .join('lots', 'lots.id', 'verdicts.lot_id')
      .where({ channel_id: channel.id, is_current: true })
      .orderBy('lots.number')
      .pluck('specification_state');
    // Lot 25015 begins at 06:00 on the 10th, with the new version.
    expect(states).toEqual([...Array(15).fill('inside_specification'), ...Array(9).fill('outside_specification')]);
    const held = await app
      .database('holds')
      .join('hold_causes', 'hold_causes.hold_id', 'holds.id')
      .join('lots', 'lots.id', 'holds.lot_id')
      .where({ signal: 'outside_specification' })
      .orderBy('number')
      .pluck('number');
    expect(held).toEqual(Array.from({ length: 9 }, (_, index) => String(25015 + index)));
  });
});
