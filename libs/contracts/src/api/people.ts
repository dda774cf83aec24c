import type { Permission, Role } from '../roles';

/** POST auth/sign-in and auth/refresh. */
export interface SignInAnswer {
  accessToken: string;
}

export interface MembershipView {
  plant: { id: number; name: string; timeZone: string };
  roles: Role[];
  permissions: Permission[];
  /** Lines the person is assigned to; mail goes by these. */
  lineIds: number[];
}

/** GET me. */
export interface Me {
  id: number;
  name: string;
  email: string;
  memberships: MembershipView[];
  /** Where caught mail is read, in demo mode only. */
  mailCatcherUrl: string | null;
}
