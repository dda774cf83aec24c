import { ROLES } from '@app/contracts';
import { hashOfSecret, newSecret } from '../../../apps/api/src/auth/secret-tokens';
import { madeSummary } from '../../../libs/contracts/src/testing/made-summary';
import { startTestApp, type TestApp } from '../app';
import { insertRow } from '../factories/insert';
import { insertHold } from '../factories/holds';
import { insertIntake, insertLot, insertReadings } from '../factories/lots';
import { insertPerson, signIn, type TestPerson } from '../factories/people';
import { insertPlan } from '../factories/plans';
import { insertPlant, type TestPlant } from '../factories/plant';
import { insertShift, type TestShift } from '../factories/shift';
import { insertFit, insertVerdict } from '../factories/verdicts';
import { ONE_ROLE_EACH, type OneRole } from './who';

export type Headers = { authorization: string };

/** A plant with one of each thing, somebody of each role and no other, and somebody who may do everything at another plant. */
export interface World {
  app: TestApp;
  shift: TestShift;
  plant: TestPlant;
  /** Where the stranger may do everything. */
  other: TestPlant;
  /** Open, for control limits alone, from an intake that the second engineer confirmed. */
  holdId: number;
  proposedPlanId: number;
  summaryId: number;
  /** Read and not confirmed: nothing came of it. */
  unconfirmedIntakeId: number;
  /** Of a layout that is remembered on the first line. */
  layoutId: number;
  /** Of the engineer's API token. */
  apiTokenId: number;
  /** Of coat weight's next specification, by the engineer. */
  proposalId: number;
  /** Serves nowhere. */
  spareGaugeId: number;
  /** An engineer of the plant to whom things are done. */
  colleague: TestPerson;
  /** Of a link by which the colleague may choose another password. */
  linkSecret: string;
  /** A mail of the plant that was given up. */
  mailId: number;
  as: Record<OneRole | 'stranger', Headers>;
}

export const PLANT_NAME = 'Marrowby Works';

export async function openWorld(): Promise<World> {
  const app = await startTestApp();
  const db = app.database;
  const shift = await insertShift(app, { name: PLANT_NAME, engineerMayRelease: true });
  const { plant } = shift;
  const other = await insertPlant(db, { name: 'Overdale', domain: 'overdale.example' });
  await insertPerson(db, { email: 'stranger@overdale.example', plantId: other.id, roles: [...ROLES] });
  const colleague = await insertPerson(db, {
    email: 'colleague@marrowby.example',
    plantId: plant.id,
    roles: ['engineer'],
  });
  await answerUploadsAtOnce(app);
  const as = {} as World['as'];
  for (const name of ONE_ROLE_EACH) as[name] = await signIn(app, plant.people[name].email);
  as.stranger = await signIn(app, 'stranger@overdale.example');
  const proposedPlanId = await insertPlan(db, plant, plant.channels[0], { state: 'proposed', revision: 2 });
  return {
    app,
    shift,
    plant,
    other,
    holdId: await openHold(app, shift),
    proposedPlanId,
    unconfirmedIntakeId: await insertIntake(db, plant, { state: 'needs_attention' }),
    layoutId: await insertLayout(app, plant),
    apiTokenId: await insertApiToken(app, plant),
    summaryId: await insertRow(db, 'summaries', {
      plant_id: plant.id,
      week_starts_on: '2026-02-23',
      version: 1,
      content: JSON.stringify(madeSummary()),
      made_at: app.clock.now(),
    }),
    proposalId: await insertProposal(app, plant, plant.productId),
    spareGaugeId: await insertRow(db, 'gauges', { plant_id: plant.id, asset_number: 'LT-120', kind: 'laser gauge' }),
    colleague,
    linkSecret: await issueSecret(app, colleague.id),
    mailId: await insertFailedMail(app, plant),
    as,
  };
}

/** A layout of the first line, under a fingerprint of its own. */
export function insertLayout(app: TestApp, plant: TestPlant): Promise<number> {
  return insertRow(app.database, 'layouts', {
    plant_id: plant.id,
    line_id: plant.lines[0].id,
    fingerprint: hashOfSecret(newSecret()),
    reading: JSON.stringify({ sheetName: 'Readings', answers: {} }),
    remembered_at: app.clock.now(),
    remembered_by: plant.people.manager.id,
  });
}

/** A token of the engineer's that is in force. */
export function insertApiToken(app: TestApp, plant: TestPlant): Promise<number> {
  return insertRow(app.database, 'api_tokens', {
    plant_id: plant.id,
    person_id: plant.people.engineer.id,
    name: 'Old script',
    token_hash: hashOfSecret(newSecret()),
    created_at: app.clock.now(),
  });
}

/** A specification of coat weight that the engineer proposed. */
export function insertProposal(app: TestApp, plant: TestPlant, productId: number): Promise<number> {
  return insertRow(app.database, 'specification_proposals', {
    plant_id: plant.id,
    product_id: productId,
    characteristic_id: plant.channels[0].characteristicId,
    nominal: 60,
    lower: 59,
    upper: 61,
    applies_to_individuals: false,
    valid_from: app.clock.now(),
    reason: 'The customer asks for less spread.',
    proposed_by: plant.people.engineer.id,
    proposed_at: app.clock.now(),
  });
}

/** The secret of a link that resets a person's password. */
export async function issueSecret(app: TestApp, personId: number): Promise<string> {
  const secret = newSecret();
  await insertRow(app.database, 'person_tokens', {
    person_id: personId,
    purpose: 'password_reset',
    token_hash: hashOfSecret(secret),
    created_at: app.clock.now(),
    expires_at: new Date(app.clock.now().getTime() + 3_600_000),
  });
  return secret;
}

function insertFailedMail(app: TestApp, plant: TestPlant): Promise<number> {
  return insertRow(app.database, 'outbox', {
    plant_id: plant.id,
    event: 'intake-1',
    kind: 'held-lots',
    recipient: plant.people.lead.email,
    subject: 'Lot 24118 is held',
    html: '<p>Lot 24118 is held.</p>',
    plain_text: 'Lot 24118 is held.',
    message_id: '<one@marrowby.example>',
    state: 'failed',
    last_error: 'no such mailbox',
    next_attempt_at: app.clock.now(),
    created_at: app.clock.now(),
  });
}

let lots = 24300;

/** Another open hold that all who may decide may decide. */
export async function openHold(app: TestApp, { plant, planId }: TestShift): Promise<number> {
  const db = app.database;
  const channel = plant.channels[0];
  const intakeId = await insertIntake(db, plant, { confirmedBy: plant.people.engineer2.id });
  const lot = await insertLot(db, plant, { number: String(lots++), startsAt: '2026-03-11T09:00:00Z' });
  await insertReadings(db, plant, { channel, lot, intakeId }, [60, 60.1]);
  const fitId = await insertFit(db, plant, channel.id, planId);
  const verdictId = await insertVerdict(db, plant, { channel, lot }, { fitId, score: 4.2 });
  return insertHold(db, plant, { lot, causes: [{ channel, verdictId, intakeId }] });
}

/** No worker reads here, for which an upload would wait: the database refuses each intake in its place. */
async function answerUploadsAtOnce(app: TestApp): Promise<void> {
  await app.database.raw(`
    create function refuse_at_once() returns trigger language plpgsql as $$
    begin
      if new.state = 'received' then
        new.state := 'refused';
        new.failure := 'Nobody reads here.';
      end if;
      return new;
    end $$;
    create trigger intakes_refused_at_once before insert on intakes for each row execute function refuse_at_once();
  `);
}
