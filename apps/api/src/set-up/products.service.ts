import { Inject, Injectable } from '@nestjs/common';
import type { ProductBody, ProductSetUpView, NewProductBody, Page } from '@app/contracts';
import { type Database, findProductSetUp, type ProductSetUpRow, listProductSetUps, type Person } from '@app/data';
import { DATABASE } from '@app/platform';
import { AccessService } from '../access/access.service';
import { onePage } from '../platform/paging';
import { addProduct, changeProduct, productView } from './products';
import { SetUpWrites } from './set-up-writes.service';

@Injectable()
export class SetUpProductsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly access: AccessService,
    private readonly writes: SetUpWrites,
  ) {}

  async list(person: Person, plantId: number): Promise<Page<ProductSetUpView>> {
    await this.access.require(person.id, plantId, 'read');
    return onePage((await listProductSetUps(this.database, plantId)).map(productView));
  }

  async add(person: Person, plantId: number, body: NewProductBody): Promise<ProductSetUpView> {
    return this.view(await this.writes.inPlant(person, plantId, (tx, change) => addProduct(tx, change, body)));
  }

  async change(person: Person, id: number, body: ProductBody): Promise<ProductSetUpView> {
    const product = await findProductSetUp(this.database, id);
    await this.writes.ofThing(person, product, (tx, change) => changeProduct(tx, change, id, body));
    return this.view(id);
  }

  private async view(id: number): Promise<ProductSetUpView> {
    return productView((await findProductSetUp(this.database, id)) as ProductSetUpRow);
  }
}
