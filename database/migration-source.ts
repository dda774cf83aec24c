import type { Knex } from 'knex';
import * as plantsAndPeople from './migrations/20261201090000_create_plants_and_people';
import * as channelsAndSpecifications from './migrations/20261201090100_create_channels_and_specifications';
import * as intakesAndReadings from './migrations/20261201090200_create_intakes_and_readings';
import * as plansAndVerdicts from './migrations/20261201090300_create_plans_and_verdicts';
import * as holdsAndDecisions from './migrations/20261201090400_create_holds_and_decisions';
import * as outboxAndAudit from './migrations/20261201090500_create_outbox_and_audit';
import * as robustPlans from './migrations/20261201131000_add_robust_to_plan_revisions';
import * as setUpAndPeople from './migrations/20261201140000_add_set_up_and_people';
import * as auditIndexes from './migrations/20261201141500_index_audit_by_person_and_thing';
import * as supersedeAndWithdrawal from './migrations/20261201151000_add_supersede_and_withdrawal';
import * as intakeAnswers from './migrations/20261201152000_add_intake_answers';
import * as mailsOfNoPlant from './migrations/20261201185200_let_mails_be_of_no_plant';

/** Every migration by name, oldest first. They are listed here, not read from a folder, so that they go into the bundle. */
const MIGRATIONS: Record<string, Knex.Migration> = {
  '20261201090000_create_plants_and_people': plantsAndPeople,
  '20261201090100_create_channels_and_specifications': channelsAndSpecifications,
  '20261201090200_create_intakes_and_readings': intakesAndReadings,
  '20261201090300_create_plans_and_verdicts': plansAndVerdicts,
  '20261201090400_create_holds_and_decisions': holdsAndDecisions,
  '20261201090500_create_outbox_and_audit': outboxAndAudit,
  '20261201131000_add_robust_to_plan_revisions': robustPlans,
  '20261201140000_add_set_up_and_people': setUpAndPeople,
  '20261201141500_index_audit_by_person_and_thing': auditIndexes,
  '20261201151000_add_supersede_and_withdrawal': supersedeAndWithdrawal,
  '20261201152000_add_intake_answers': intakeAnswers,
  '20261201185200_let_mails_be_of_no_plant': mailsOfNoPlant,
};

export const migrationNames = Object.keys(MIGRATIONS);

export const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: () => Promise.resolve(migrationNames),
  getMigrationName: (name) => name,
  getMigration: (name) => Promise.resolve(MIGRATIONS[name]),
};
