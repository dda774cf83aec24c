export const ROLES = ['engineer', 'quality_manager', 'technician', 'line_lead', 'director', 'administrator'] as const;
export type Role = (typeof ROLES)[number];

export const ROLE_NAMES: Record<Role, string> = {
  engineer: 'quality engineer',
  quality_manager: 'quality manager',
  technician: 'metrology technician',
  line_lead: 'line lead',
  director: 'plant director',
  administrator: 'administrator',
};

/** Who may do what at a plant. Reading needs any role; the rest is listed. */
export const PERMISSIONS = {
  read: ROLES,
  upload_intake: ['engineer', 'quality_manager'],
  set_aside: ['engineer', 'quality_manager', 'line_lead'],
  /** For engineers only where the plant allows it, and only for control limits alone. */
  release_for_control_limits: ['engineer', 'quality_manager'],
  decide_hold: ['quality_manager'],
  approve_plan: ['quality_manager'],
  propose_plan: ['engineer', 'quality_manager'],
  exclude_lot: ['engineer', 'quality_manager'],
  declare_break: ['engineer', 'quality_manager'],
  record_gauge_check: ['engineer', 'quality_manager', 'technician'],
  read_summary: ['engineer', 'quality_manager', 'director'],
  send_summary: ['quality_manager'],
  read_audit: ['engineer', 'quality_manager', 'director', 'administrator'],
  set_up_plant: ['administrator'],
  propose_specification: ['engineer', 'quality_manager', 'administrator'],
  /** Not by who proposed it. */
  approve_specification: ['quality_manager'],
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

export function permissionsOf(roles: readonly Role[]): Permission[] {
  return (Object.keys(PERMISSIONS) as Permission[]).filter((permission) =>
    (PERMISSIONS[permission] as readonly Role[]).some((role) => roles.includes(role)),
  );
}
