import type { Rows } from './row';
import { INTAKE_ROWS } from './rows/intakes';
import { MAIL_ROWS } from './rows/mails';
import { PEOPLE_ROWS } from './rows/people';
import { PROFILE_ROWS } from './rows/profile';
import { READING_ROWS } from './rows/reading';
import { SET_UP_PLANT_ROWS } from './rows/set-up-plant';
import { SET_UP_THING_ROWS } from './rows/set-up-things';
import { SET_UP_WORKBOOK_ROWS } from './rows/set-up-workbook';
import { SIGN_IN_ROWS } from './rows/sign-in';
import { SUMMARY_ROWS } from './rows/summaries';
import { WORK_ROWS } from './rows/work';

const AREAS: Rows[] = [
  SIGN_IN_ROWS,
  READING_ROWS,
  WORK_ROWS,
  INTAKE_ROWS,
  MAIL_ROWS,
  PEOPLE_ROWS,
  SET_UP_PLANT_ROWS,
  SET_UP_THING_ROWS,
  SET_UP_WORKBOOK_ROWS,
  SUMMARY_ROWS,
  PROFILE_ROWS,
];

/** Every route by hand: who may, and what a write leaves in the audit. A new route needs its row here. */
export const ROWS: Rows = Object.assign({}, ...AREAS) as Rows;

export const ROUTES_WITH_ROW = AREAS.flatMap((rows) => Object.keys(rows));
