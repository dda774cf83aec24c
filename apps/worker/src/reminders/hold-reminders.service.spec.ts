import { Logger } from '@nestjs/common';
import type { Config, Dispatcher } from '@app/platform';
import { insertDecision, insertHold } from '../../../../test/support/factories/holds';
import { insertIntake, insertLot, insertReadings } from '../../../../test/support/factories/lots';
import { insertPlan } from '../../../../test/support/factories/plans';
import { insertFit, insertVerdict } from '../../../../test/support/factories/verdicts';
import { WorkerBench } from '../testing/worker-bench';
import { HoldRemindersService } from './hold-reminders.service';

const OPENED = new Date('2026-03-02T02:00:00Z');
const HOUR = 3_600_000;

describe('open holds that grow old', () => {
  let bench: WorkerBench;
  let dispatched: number[];
  beforeAll(async () => {
    bench = await WorkerBench.open();
  });
  afterAll(() => bench.close());
  beforeEach(async () => {
    await bench.reset();
    dispatched = [];
  });
  afterEach(() => jest.restoreAllMocks());

  const service = () => {
    const dispatcher = { mails: (ids: number[]) => Promise.resolve(void dispatched.push(...ids)) };
    const config = { publicUrl: 'http://127.0.0.1:3000' } as Config;
    return new HoldRemindersService(bench.db, config, bench.clock, dispatcher as unknown as Dispatcher, bench.running);
  };
  const lookAt = async (hours: number, worker = service()) => {
    bench.clock.set(new Date(OPENED.getTime() + hours * HOUR));
    await worker.look();
  };
  const held = async (number: string, openedAt = OPENED): Promise<number> => {
    const { plant } = bench.place;
    const channel = plant.channels[0];
    const intakeId = await insertIntake(bench.db, plant);
    const lot = await insertLot(bench.db, plant, { number, startsAt: '2026-03-01T20:00:00Z' });
    await insertReadings(bench.db, plant, { channel, lot, intakeId }, [59.4, 59.7]);
    const verdictId = await insertVerdict(bench.db, plant, { channel, lot }, { fitId, score: -4.3 });
    return insertHold(bench.db, plant, { lot, openedAt, causes: [{ channel, verdictId, intakeId }] });
  };
  let fitId: number;
  beforeEach(async () => {
    const { plant } = bench.place;
    const planId = await insertPlan(bench.db, plant, plant.channels[0]);
    fitId = await insertFit(bench.db, plant, plant.channels[0].id, planId);
  });
  const mails = () => bench.db('outbox').orderBy('id').select('id', 'recipient', 'subject', 'event', 'kind');
  const reminders = () =>
    bench.db('hold_reminders').orderBy(['hold_id', 'audience']).select('hold_id', 'audience', 'reminded_at');

  it('are told of to the quality managers once they are eight hours old, not a minute before', async () => {
    const holdId = await held('24118');
    await lookAt(8 - 1 / 60);
    expect([await mails(), await reminders()]).toEqual([[], []]);
    await lookAt(8);
    const [mail, ...more] = await mails();
    expect(more).toEqual([]);
    expect(mail).toMatchObject({
      recipient: 'manager@marrowby.example',
      subject: 'Lot 24118 held for 8 h, Coater 2',
      kind: 'hold-reminder',
    });
    expect(dispatched).toEqual([mail.id]);
    expect(await reminders()).toEqual([
      { hold_id: holdId, audience: 'quality_manager', reminded_at: new Date(OPENED.getTime() + 8 * HOUR) },
    ]);
  });

  it('are told of to the director after a day, with when the managers were', async () => {
    await held('24118');
    await lookAt(8);
    await lookAt(24);
    const [, toDirector] = await mails();
    expect(toDirector).toMatchObject({ recipient: 'director@marrowby.example' });
    const { plain_text: text } = await bench.db('outbox').where({ id: toDirector.id }).first('plain_text');
    expect(text).toContain('Quality managers reminded: 2 Mar 2026, 10:00');
    expect(text).toContain('May decide: manager');
  });

  it('are told of once: also by later looks, after a restart, and by two workers at once', async () => {
    await held('24118');
    await held('24119');
    bench.clock.set(new Date(OPENED.getTime() + 30 * HOUR));
    await Promise.all([service().look(), service().look()]);
    await service().look();
    await lookAt(50);
    expect((await mails()).map(({ recipient }) => recipient)).toEqual([
      'manager@marrowby.example',
      'director@marrowby.example',
    ]);
    expect(await reminders()).toHaveLength(4);
    expect(await bench.db('audit_entries').where({ action: 'remind-hold' })).toHaveLength(4);
  });

  it('come in one mail a look, which names only those that were not told of before', async () => {
    await held('24118');
    await lookAt(8);
    await held('24119', new Date(OPENED.getTime() + HOUR));
    await held('24120', new Date(OPENED.getTime() + HOUR));
    await lookAt(9);
    const subjects = (await mails()).map(({ subject }) => subject);
    expect(subjects).toEqual(['Lot 24118 held for 8 h, Coater 2', '2 lots held for more than 8 h, Marrowby Works']);
  });

  it('are not told of once decided, nor to who does not want it', async () => {
    const { plant } = bench.place;
    const holdId = await held('24118');
    await insertDecision(bench.db, plant, { holdId, disposition: 'release' });
    await lookAt(30);
    expect(await mails()).toEqual([]);
    await held('24119');
    const word = { plant_id: plant.id, kind: 'hold_reminders', is_wanted: false };
    await bench.db('mail_subscriptions').insert({ ...word, person_id: plant.people.manager.id });
    await lookAt(31);
    expect((await mails()).map(({ recipient }) => recipient)).toEqual(['director@marrowby.example']);
  });

  it('wait for somebody to tell: nothing is recorded while nobody is there', async () => {
    const { plant } = bench.place;
    await held('24118');
    await bench.db('people').where({ id: plant.people.manager.id }).update({ disabled_at: OPENED });
    await lookAt(9);
    expect(await reminders()).toEqual([]);
    await bench.db('people').where({ id: plant.people.manager.id }).update({ disabled_at: null });
    await lookAt(10);
    expect(await mails()).toHaveLength(1);
  });

  it('keep the plant’s own times', async () => {
    await bench
      .db('plants')
      .where({ id: bench.place.plant.id })
      .update({ reminder_manager_hours: 1.5, reminder_director_hours: 2 });
    await held('24118');
    await lookAt(1.6);
    await lookAt(2);
    expect(await mails()).toHaveLength(2);
  });

  it('are neither recorded nor mailed when the transaction fails, and told of by the next look', async () => {
    jest.spyOn(Logger.prototype, 'warn').mockImplementation(() => undefined);
    await held('24118');
    await bench.db.raw(`alter table outbox add constraint outbox_refuses check (kind <> 'hold-reminder') not valid`);
    await lookAt(9);
    await bench.db.raw('alter table outbox drop constraint outbox_refuses');
    expect([await mails(), await reminders()]).toEqual([[], []]);
    await lookAt(10);
    expect([(await mails()).length, (await reminders()).length]).toEqual([1, 1]);
  });
});
