import { Inject, Injectable } from '@nestjs/common';
import type { Page, SpecificationProposalBody, SpecificationSetUpView } from '@app/contracts';
import {
  type Database,
  findSpecificationProposal,
  listCharacteristicSetUps,
  listProductSetUps,
  listSpecificationProposals,
  listSpecificationVersions,
  type Person,
  type SpecificationProposalRow,
} from '@app/data';
import { DATABASE, Dispatcher } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { SetUpWrites } from './set-up-writes.service';
import { approveSpecification, refuseApproval, withdrawSpecification } from './specification-approval';
import { type SpecificationRows, specificationView, specificationViews } from './specification-view';
import { proposeSpecification } from './specifications';

/** Specifications: proposed by one person, put in force by another. */
@Injectable()
export class SpecificationsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
    private readonly dispatcher: Dispatcher,
  ) {}

  async list(person: Person, plantId: number): Promise<Page<SpecificationSetUpView>> {
    const { roles } = await this.access.require(person.id, plantId, 'read');
    return onePage(specificationViews(await this.rows(plantId), { id: person.id, roles }));
  }

  async propose(person: Person, plantId: number, body: SpecificationProposalBody): Promise<SpecificationSetUpView> {
    const id = await this.writes.inPlant(
      person,
      plantId,
      (tx, change) => proposeSpecification(tx, change, body),
      'propose_specification',
    );
    return this.viewOf(person, (await findSpecificationProposal(this.database, id)) as SpecificationProposalRow);
  }

  /** Throws unless this person may approve the proposal now; asked before the password. */
  async requireApprovable(person: Person, id: number): Promise<void> {
    const { proposal, roles } = await this.require(person, id, 'approve_specification');
    refuseApproval(proposal, { id: person.id, roles });
  }

  async approve(person: Person, id: number): Promise<SpecificationSetUpView> {
    const { proposal, roles } = await this.require(person, id, 'approve_specification');
    const owed = await this.writes.inPlant(
      person,
      proposal.plantId,
      (tx, change) => approveSpecification(tx, { ...change, roles }, id),
      'approve_specification',
    );
    await this.dispatcher.owedJobs(owed);
    return this.viewOf(person, proposal);
  }

  async withdraw(person: Person, id: number): Promise<SpecificationSetUpView> {
    const { proposal, roles } = await this.require(person, id, 'propose_specification');
    await this.writes.inPlant(
      person,
      proposal.plantId,
      (tx, change) => withdrawSpecification(tx, { ...change, roles }, id),
      'propose_specification',
    );
    return this.viewOf(person, proposal);
  }

  private async require(person: Person, id: number, permission: 'propose_specification' | 'approve_specification') {
    const found = await findSpecificationProposal(this.database, id);
    const { thing, roles } = await this.access.requireThing(person.id, found, permission);
    return { proposal: thing, roles };
  }

  private async rows(plantId: number): Promise<SpecificationRows> {
    const [products, characteristics, versions, proposals] = await Promise.all([
      listProductSetUps(this.database, plantId),
      listCharacteristicSetUps(this.database, plantId),
      listSpecificationVersions(this.database, plantId),
      listSpecificationProposals(this.database, plantId),
    ]);
    return { products, characteristics, versions, proposals };
  }

  private async viewOf(
    person: Person,
    of: { plantId: number; productId: number; characteristicId: number },
  ): Promise<SpecificationSetUpView> {
    const { roles } = await this.access.require(person.id, of.plantId, 'read');
    return specificationView(await this.rows(of.plantId), of, { id: person.id, roles });
  }
}
