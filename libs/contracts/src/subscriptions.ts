import type { Role } from './roles';

/** What comes by mail, and may be wanted or not. */
export const MAIL_KINDS = ['weekly_summary', 'held_lots', 'decisions', 'hold_reminders'] as const;
export type MailKind = (typeof MAIL_KINDS)[number];

export const MAIL_KIND_NAMES: Record<MailKind, string> = {
  weekly_summary: 'the weekly summary',
  held_lots: 'lots that were held on your lines',
  decisions: 'decisions on lots of your lines',
  hold_reminders: 'reminders of open holds that grow old',
};

/** Which roles may have a mail at all. */
export const MAIL_KIND_ROLES = {
  weekly_summary: ['engineer', 'quality_manager', 'director'],
  held_lots: ['engineer', 'quality_manager', 'technician', 'line_lead', 'director'],
  decisions: ['engineer', 'quality_manager', 'technician', 'line_lead', 'director'],
  hold_reminders: ['quality_manager', 'director'],
} as const satisfies Record<MailKind, readonly Role[]>;

/** Which roles have it as long as they have not said otherwise; of the mails about a line, engineers and line leads those of their own lines. */
export const MAIL_KIND_DEFAULT_ROLES = {
  weekly_summary: ['director'],
  held_lots: ['engineer', 'quality_manager', 'line_lead'],
  decisions: ['engineer', 'quality_manager', 'line_lead'],
  hold_reminders: ['quality_manager', 'director'],
} as const satisfies Record<MailKind, readonly Role[]>;
