export { createDatabase, type Database, type Queryable, type Transaction } from './database';
export * from './audit';
export * from './owed-jobs';
