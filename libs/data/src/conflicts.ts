import { DomainError } from '@app/contracts';

interface PostgresError {
  code: string;
  constraint?: string;
}

const isPostgresError = (error: unknown): error is PostgresError =>
  typeof error === 'object' && error !== null && typeof (error as PostgresError).code === 'string';

/** Runs `work`; a violation of one of the named constraints becomes a domain conflict with its sentence. */
export async function withConflicts<T>(
  conflicts: Record<string, { code: string; detail: string }>,
  work: () => Promise<T>,
): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const conflict = isPostgresError(error) && error.constraint ? conflicts[error.constraint] : undefined;
    if (!conflict) throw error;
    throw new DomainError('conflict', conflict.code, conflict.detail);
  }
}
