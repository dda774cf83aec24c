import type { Permission, Role } from '../roles';
import type { MailKind } from '../subscriptions';
import type { Instant } from './common';

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

export const THEMES = ['system', 'light', 'dark'] as const;
export type Theme = (typeof THEMES)[number];

/** GET me. */
export interface Me {
  id: number;
  name: string;
  email: string;
  theme: Theme;
  memberships: MembershipView[];
  /** Whether this is the person whom the installation began with, who makes plants. */
  isInstallationAdministrator: boolean;
  /** Where caught mail is read, in demo mode only. */
  mailCatcherUrl: string | null;
}

/** PATCH me: what is left out stays. */
export interface ProfileRequest {
  name?: string;
  theme?: Theme;
}

/** POST me/password: ends every other session of the person. */
export interface PasswordRequest {
  current: string;
  next: string;
}

/** One kind of mail that the person's roles at a plant may have. */
export interface SubscriptionView {
  kind: MailKind;
  isWanted: boolean;
  /** Whether the person said so; otherwise it follows from the roles. */
  isChosen: boolean;
}

/** GET and PUT me/subscriptions/:plantId. */
export interface SubscriptionsView {
  plantId: number;
  subscriptions: SubscriptionView[];
}

export interface SubscriptionsRequest {
  subscriptions: { kind: MailKind; isWanted: boolean }[];
}

export const LINK_PURPOSES = ['invitation', 'password_reset', 'first_administrator'] as const;
export type LinkPurpose = (typeof LINK_PURPOSES)[number];

/** GET auth/links/:token: whose link it is and what for. */
export interface LinkView {
  purpose: LinkPurpose;
  name: string;
  email: string;
  expiresAt: Instant;
}

/** POST auth/links/:token: chooses the password. Name and address may be given by the first administrator alone. */
export interface LinkRequest {
  password: string;
  name?: string;
  email?: string;
}

/** Under which address the person may now sign in. */
export interface LinkAnswer {
  email: string;
}

/**
 * The least number of characters of a password. NIST SP 800-63B-4 (2025), 3.1.1.2: fifteen where a password is the only thing that is
 * asked for, no rules of composition, and a list of those that are not taken.
 */
export const PASSWORD_MINIMUM = 15;
export const PASSWORD_MAXIMUM = 1024;

export const PERSON_STATES = ['invited', 'active', 'disabled'] as const;
export type PersonState = (typeof PERSON_STATES)[number];

/** An entry of GET plants/:id/people; the answer of what changes a person. */
export interface PersonView {
  id: number;
  name: string;
  email: string;
  roles: Role[];
  lineIds: number[];
  state: PersonState;
  /** Of an invited person: until when the link works, or worked; null when there is none. */
  invitedUntil: Instant | null;
}

/** POST plants/:id/people. Somebody who is known already keeps their own name. */
export interface InvitationRequest {
  email: string;
  name: string;
  roles: Role[];
  lineIds: number[];
}

/** PATCH plants/:id/people/:personId. Without any role the person is nobody at the plant any more. */
export interface RolesRequest {
  roles: Role[];
  lineIds: number[];
}
