import { routes } from '../../app/urls';

/** Where a sign-in leads: a path of ours, never another site. */
export function safeNext(next: string | null): string {
  const isOurs = next !== null && /^\/(?![/\\])/.test(next) && !next.startsWith(routes.signIn);
  return isOurs ? next : routes.desk;
}
