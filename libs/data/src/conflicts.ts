import { DomainError } from '@app/contracts';

interface PostgresError {
  code: string;
  constraint?: string;
}

/** What a violated constraint means to a person; `pointer` names the field of the request that is to change, if one is. */
export interface Conflict {
  code: string;
  detail: string;
  pointer?: string;
}

const isPostgresError = (error: unknown): error is PostgresError =>
  typeof error === 'object' && error !== null && typeof (error as PostgresError).code === 'string';

/** Runs `work`; a violation of one of the named constraints becomes a domain conflict with its sentence. */
export async function withConflicts<T>(conflicts: Record<string, Conflict>, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const conflict = isPostgresError(error) && error.constraint ? conflicts[error.constraint] : undefined;
    if (!conflict) throw error;
    const { code, detail, pointer } = conflict;
    throw new DomainError('conflict', code, detail, pointer === undefined ? [] : [{ pointer, code, detail }]);
  }
}
