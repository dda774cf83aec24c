import { Inject, Injectable } from '@nestjs/common';
import { DomainError, type Permission, permissionsOf, ROLE_NAMES, PERMISSIONS, type Role } from '@app/contracts';
import { type Database, listRoles } from '@app/data';
import { DATABASE } from '@app/platform';
import { notFound } from './not-found';

/** Who may do what where. */
@Injectable()
export class AccessService {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The person's roles at the plant; throws when the person is nobody there (not found) or may not do that (forbidden). */
  async require(personId: number, plantId: number, permission: Permission): Promise<{ roles: Role[] }> {
    const roles = await listRoles(this.database, personId, plantId);
    if (roles.length === 0) throw notFound();
    if (permissionsOf(roles).includes(permission)) return { roles };
    const who = PERMISSIONS[permission].map((role) => ROLE_NAMES[role]).join(' or ');
    throw new DomainError('forbidden', 'forbidden', `You may not do that here: it takes the role of ${who}.`);
  }

  /** The same for a thing that was looked up: undefined is answered as a foreign plant's thing is. */
  async requireThing<T extends { plantId: number }>(
    personId: number,
    thing: T | undefined,
    permission: Permission,
  ): Promise<{ thing: T; roles: Role[] }> {
    if (thing === undefined) throw notFound();
    const { roles } = await this.require(personId, thing.plantId, permission);
    return { thing, roles };
  }
}
