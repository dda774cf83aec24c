import type { Instant } from './common';

/** GET plants/:id/api-tokens: one's own at the plant. */
export interface ApiTokenView {
  id: number;
  name: string;
  createdAt: Instant;
  lastUsedAt: Instant | null;
  revokedAt: Instant | null;
}

/** POST plants/:id/api-tokens. */
export interface ApiTokenRequest {
  /** Where it is used: "line computer of Coater 2". */
  name: string;
}

/** The only answer that ever shows the token. */
export interface NewApiToken extends ApiTokenView {
  token: string;
}
