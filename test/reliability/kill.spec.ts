import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { MailCatcher } from '@app/mail';
import { Client } from 'pg';
import { RouteClient } from './support/client';
import { BAD_LOT } from './support/history';
import { type Outcome, outboxMessageIds, readOutcome } from './support/outcome';
import { freePort, Program, until } from './support/program';
import { makeScene, type Scene } from './support/scene';
import { StopPoint } from './support/stop-point';

jest.setTimeout(120_000);

interface Place {
  point: StopPoint;
  /** Resolves when a mail begins to be sent; mails wait from then on until the program was killed. */
  mailBegun: Promise<void>;
  stateIs(state: string): Promise<void>;
}

interface KillPoint {
  when: string;
  /** What holds the program there, installed before the upload, or before the confirmation. */
  before: 'upload' | 'confirm';
  hold: (place: Place) => Promise<void>;
  /** Resolves when the program is there. */
  reached: (place: Place) => Promise<void>;
  /** Mails may go out before the program is killed; otherwise they wait at their beginning. */
  isMailFree?: boolean;
}

const atOwed = (name: string) => (place: Place) =>
  place.point.atTrigger('owed_jobs', 'update', `new.name = '${name}' and old.attempts = 0`);
const waits = ({ point }: Place) => point.reached();

const KILL_POINTS: KillPoint[] = [
  { when: 'after the bytes are stored', before: 'upload', hold: atOwed('read-intake'), reached: waits },
  {
    when: 'during COPY',
    before: 'upload',
    hold: ({ point }) => point.atTrigger('staged_readings', 'insert', 'new.ordinal = 50'),
    reached: waits,
  },
  { when: 'after the confirmation', before: 'confirm', hold: atOwed('score-intake'), reached: waits },
  {
    when: 'while the readings are stored',
    before: 'confirm',
    hold: ({ point }) => point.atTrigger('lot_channels', 'update'),
    reached: waits,
  },
  {
    when: 'after the readings',
    before: 'confirm',
    hold: ({ point }) => point.atReading('plan_revisions'),
    reached: async (place) => {
      await place.stateIs('working');
      await place.point.reached();
    },
  },
  {
    when: 'during a fit',
    before: 'confirm',
    hold: ({ point }) => point.atTrigger('fits', 'insert'),
    reached: async ({ point }) => {
      await until(
        'a channel is judged',
        () => Promise.resolve(point.progress.some(({ stage }) => stage === 'judging')),
        {
          everyMs: 1,
        },
      );
    },
  },
  {
    when: 'before the verdict transaction',
    before: 'confirm',
    hold: ({ point }) => point.atReading('breaks'),
    reached: async (place) => {
      await place.stateIs('working');
      await place.point.reached();
      await place.point.atChannelsInstead();
      await until('both channels are judged', () =>
        Promise.resolve(place.point.progress.some(({ channelsScored }) => channelsScored === 2)),
      );
      await place.point.reached();
    },
  },
  {
    when: 'in the verdict transaction',
    before: 'confirm',
    hold: ({ point }) => point.atTrigger('hold_causes', 'insert'),
    reached: waits,
  },
  {
    when: 'after the verdict transaction',
    before: 'confirm',
    hold: ({ point }) => point.atTrigger('outbox', 'update'),
    reached: async (place) => {
      await place.stateIs('scored');
      await place.point.reached();
    },
  },
  { when: 'during SMTP DATA', before: 'confirm', hold: async () => {}, reached: ({ mailBegun }) => mailBegun },
  {
    when: 'after SMTP accepted and before that is recorded',
    before: 'confirm',
    hold: ({ point }) => point.atTrigger('outbox', 'update', "new.state = 'sent'"),
    reached: waits,
    isMailFree: true,
  },
];

/** One run of the workbook: its own database, mail catcher and program. */
class Run {
  readonly client: RouteClient;
  private program?: Program;
  private readonly folder = mkdtempSync(join(tmpdir(), 'ebbline-kill-'));
  private catcher!: MailCatcher;
  private watcher!: Client;
  private mailGate?: { begun: () => void; opened: Promise<void> };

  private constructor(
    private readonly scene: Scene,
    private readonly port: number,
    private readonly database: { url: string; drop(): Promise<void> },
  ) {
    this.client = new RouteClient(port);
  }

  static async open(scene: Scene): Promise<Run> {
    const run = new Run(scene, await freePort(), await scene.copy());
    run.catcher = await MailCatcher.start({ folder: run.folder, onData: () => run.atMail() });
    run.watcher = new Client({ connectionString: run.database.url });
    await run.watcher.connect();
    return run;
  }

  get url(): string {
    return this.database.url;
  }

  private async atMail(): Promise<void> {
    this.mailGate?.begun();
    await this.mailGate?.opened;
  }

  /** Mails wait at their beginning; answers when the first does, and how to let them go on. */
  closeMailGate(): { begun: Promise<void>; open: () => void } {
    let open = () => {};
    const opened = new Promise<void>((resolve) => {
      open = resolve;
    });
    const begun = new Promise<void>((resolve) => {
      this.mailGate = { begun: resolve, opened };
    });
    return { begun, open };
  }

  async start(): Promise<void> {
    this.program = Program.start({
      app: 'api',
      databaseUrl: this.url,
      smtpUrl: this.catcher.smtpUrl,
      port: this.port,
    });
    await this.client.ready(this.program);
  }

  kill = (): Promise<void> => this.program!.kill();

  async stateIs(state: string): Promise<number> {
    return until(
      `the intake is ${state}`,
      async () => {
        const { rows } = await this.watcher.query<{ id: number }>(
          "select id from intakes where state = $1 and file_name = 'shift.xlsx'",
          [state],
        );
        return Number(rows[0]?.id ?? 0);
      },
      { everyMs: 5 },
    );
  }

  upload = () => this.client.upload(this.scene.plant.lines[0].id, 'shift.xlsx', this.scene.workbook);

  /** Until the intake is scored, no mail waits and nothing is owed any more. */
  async settled(): Promise<void> {
    await this.stateIs('scored');
    await until(
      'every mail is sent and every job done',
      async () => {
        const { rows } = await this.watcher.query<{ waiting: number }>(
          `select ((select count(*) from outbox where state <> 'sent') + (select count(*) from owed_jobs where state = 'owed'))::int as waiting`,
        );
        return rows[0].waiting === 0;
      },
      { program: this.program },
    );
  }

  async outcome(): Promise<Outcome> {
    return readOutcome(this.url, this.catcher);
  }

  caughtIds = () =>
    this.catcher
      .messages()
      .map(({ messageId }) => messageId)
      .sort();

  async close(): Promise<void> {
    await this.program?.kill();
    await this.catcher.close();
    await this.watcher.end();
    await this.database.drop();
    rmSync(this.folder, { recursive: true, force: true });
  }
}

describe('a workbook on its way', () => {
  let scene: Scene;
  let undisturbed: Outcome;

  beforeAll(async () => {
    scene = await makeScene();
    const run = await Run.open(scene);
    try {
      await run.start();
      await run.client.signIn('engineer@marrowby.example');
      const { id } = await run.upload();
      await run.client.confirm(id);
      await run.settled();
      undisturbed = await run.outcome();
    } finally {
      await run.close();
    }
  });

  afterAll(() => scene?.drop());

  it('undisturbed stores every reading, holds the bad lot, and mails it to four people', () => {
    expect(undisturbed.readings).toHaveLength((30 + 4) * 2 * 12);
    expect(undisturbed.verdicts).toHaveLength((30 + 4) * 2);
    expect(undisturbed.holds).toEqual([expect.objectContaining({ number: BAD_LOT, state: 'open', is_late: false })]);
    expect(undisturbed.mails).toHaveLength(4);
    expect(undisturbed.outbox).toHaveLength(4);
  });

  it.each(KILL_POINTS)(
    'killed $when and started again has everything once',
    async ({ before, hold, reached, isMailFree }) => {
      const run = await Run.open(scene);
      const point = await StopPoint.open(run.url);
      const gate = run.closeMailGate();
      const place: Place = {
        point,
        mailBegun: gate.begun,
        stateIs: async (state) => {
          await run.stateIs(state);
        },
      };
      try {
        await run.start();
        await run.client.signIn('engineer@marrowby.example');
        if (before === 'upload') {
          await hold(place);
          const answer = run.upload().catch(() => undefined);
          await reached(place);
          await run.kill();
          await answer;
        } else {
          const { id } = await run.upload();
          await hold(place);
          if (isMailFree) gate.open();
          await run.client.confirm(id);
          await reached(place);
          await run.kill();
        }
        await point.release();
        gate.open();
        await run.start();
        if (before === 'upload') await run.client.confirm(await run.stateIs('needs_attention'));
        await run.settled();
        expect(await run.outcome()).toEqual(undisturbed);
        expect(run.caughtIds()).toEqual(await outboxMessageIds(run.url));
      } finally {
        gate.open();
        await point.release();
        await run.close();
      }
    },
  );
});
