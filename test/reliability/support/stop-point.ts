import type { IntakeProgress } from '@app/contracts';
import { Client } from 'pg';
import { until } from './program';

const KEY = 220_471;

/**
 * Holds a program at a point from outside: triggers that wait for a lock which the test holds, and table or row locks. The point is
 * reached when somebody waits.
 */
export class StopPoint {
  readonly progress: IntakeProgress[] = [];

  private constructor(
    private readonly holder: Client,
    private readonly watcher: Client,
    private readonly locker: Client,
  ) {}

  static async open(url: string): Promise<StopPoint> {
    const [holder, watcher, locker] = [1, 2, 3].map(() => new Client({ connectionString: url }));
    await Promise.all([holder, watcher, locker].map((client) => client.connect()));
    await watcher.query(`
      create function wait_for_test() returns trigger language plpgsql as $$
      begin
        perform pg_advisory_xact_lock_shared(${KEY});
        return new;
      end $$`);
    await holder.query('select pg_advisory_lock($1)', [KEY]);
    const point = new StopPoint(holder, watcher, locker);
    watcher.on('notification', ({ payload }) => point.progress.push(JSON.parse(payload ?? '{}') as IntakeProgress));
    await watcher.query('listen intake_progress');
    return point;
  }

  /** Whoever changes this row waits. */
  async atTrigger(table: string, event: 'insert' | 'update', condition = 'true'): Promise<void> {
    await this.watcher.query(
      `create trigger wait_here before ${event} on ${table} for each row when (${condition}) execute function wait_for_test()`,
    );
  }

  /** Whoever reads the table waits. */
  async atReading(table: string): Promise<void> {
    await this.holder.query(`begin; lock table ${table} in access exclusive mode`);
  }

  /** Ends that, but whoever locks a channel waits: recording verdicts begins with it. */
  async atChannelsInstead(): Promise<void> {
    await this.locker.query('begin; select 1 from channels for update');
    await this.holder.query('commit');
  }

  /** Until somebody waits for what is held here. */
  async reached(): Promise<void> {
    await until('the point is reached', async () => {
      const { rowCount } = await this.watcher.query(
        `select 1 from pg_locks where not granted and (database is null or database = (select oid from pg_database where datname = current_database()))
           and pid in (select pid from pg_stat_activity where datname = current_database())`,
      );
      return rowCount !== 0;
    });
  }

  /** Lets everything go on. */
  async release(): Promise<void> {
    await Promise.all([this.holder, this.watcher, this.locker].map((client) => client.end()));
  }
}
