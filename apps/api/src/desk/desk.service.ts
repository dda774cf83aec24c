import { Inject, Injectable } from '@nestjs/common';
import { type DeskItem, type DeskView, type Permission, permissionsOf, type Role } from '@app/contracts';
import {
  type Database,
  type DeskHoldRow,
  findPlant,
  listDeskChannels,
  listDeskHolds,
  listDeskIntakes,
  listDeskPlans,
  listDeskSpecifications,
  type Person,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { mayDecide } from '../holds/may-decide';
import { approveItem, approveSpecificationItem, checkItem, decideItem, fixItem, setAsideItem } from './desk-items';

/** A refused workbook stays on the desk so long. */
const REFUSED_FOR = 3 * 86_400_000;

/** What waits for a person at a plant. */
@Injectable()
export class DeskService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
    private readonly access: AccessService,
  ) {}

  async read(person: Person, plantId: number): Promise<DeskView> {
    const plant = await findPlant(this.database, plantId);
    const { roles } = await this.access.requireThing(person.id, plant, 'read');
    const now = this.clock.now();
    const permissions = permissionsOf(roles);
    const ifMay = <T>(permission: Permission, load: () => Promise<T[]>) =>
      permissions.includes(permission) ? load() : Promise.resolve([]);
    const [holds, intakes, plans, specifications, channels] = await Promise.all([
      ifMay('set_aside', () => listDeskHolds(this.database, plantId, person.id)),
      ifMay('upload_intake', () =>
        listDeskIntakes(this.database, plantId, person.id, new Date(now.getTime() - REFUSED_FOR)),
      ),
      ifMay('approve_plan', () => listDeskPlans(this.database, plantId, person.id)),
      ifMay('approve_specification', () => listDeskSpecifications(this.database, plantId, person.id)),
      ifMay('record_gauge_check', () => listDeskChannels(this.database, plantId, now)),
    ]);
    return {
      items: [
        ...decidable(holds, person.id, roles).map((hold) => decideItem(hold, now)),
        ...intakes.map((intake) => fixItem(intake, now)),
        ...plans.map((plan) => approveItem(plan, now)),
        ...specifications.map((proposal) => approveSpecificationItem(proposal, plantId, now)),
        ...channels.map(checkItem),
        ...holds.filter((hold) => !hold.isSetAside && hold.isOwnLine).map((hold) => setAsideItem(hold, now)),
      ] satisfies DeskItem[],
    };
  }
}

/** Whoever may decide a hold may also set its lot aside, so the holds that were loaded cover both. */
function decidable(holds: DeskHoldRow[], personId: number, roles: Role[]): DeskHoldRow[] {
  return holds.filter((hold) => mayDecide(personId, roles, { ...hold, state: 'open' }).dispositions.length > 0);
}
