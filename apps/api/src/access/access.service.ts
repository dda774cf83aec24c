import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type Permission, permissionsOf, ROLE_NAMES, PERMISSIONS, type Role } from '@app/contracts';
import { type Database, listRoles, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { notFound } from './not-found';

/** Who may do what where. */
@Injectable()
export class AccessService {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /**
   * The person's roles at the plant, for one who acts by an API token no more than engineer; throws when the person is nobody there (not found) or may not do that (forbidden).
   */
  async require(who: number | Person, plantId: number, permission: Permission): Promise<{ roles: Role[] }> {
    const roles = await this.rolesOf(who, plantId);
    if (roles.length === 0) throw notFound();
    if (permissionsOf(roles).includes(permission)) return { roles };
    const names = PERMISSIONS[permission].map((role) => ROLE_NAMES[role]).join(' or ');
    throw new DomainError('forbidden', 'forbidden', `You may not do that here: it takes the role of ${names}.`);
  }

  /** The same for a thing that was looked up: undefined is answered as a foreign plant's thing is. */
  async requireThing<T extends { plantId: number }>(
    who: number | Person,
    thing: T | undefined,
    permission: Permission,
  ): Promise<{ thing: T; roles: Role[] }> {
    if (thing === undefined) throw notFound();
    const { roles } = await this.require(who, thing.plantId, permission);
    return { thing, roles };
  }

  private async rolesOf(who: number | Person, plantId: number): Promise<Role[]> {
    if (typeof who === 'number') return listRoles(this.database, who, plantId);
    const roles = await listRoles(this.database, who.id, plantId);
    if (who.machine === undefined) return roles;
    // A token speaks for its person as long as the person may send workbooks at its plant.
    const isInForce = who.machine.plantId === plantId && permissionsOf(roles).includes('upload_intake');
    return isInForce ? ['engineer'] : [];
  }
}
