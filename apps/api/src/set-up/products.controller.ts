import { Body, Controller, Get, Param, Patch, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import type { ProductSetUpView, Page } from '@app/contracts';
import { Permit } from '../access/permit';
import { CurrentPerson, type Person } from '../auth/current-person';
import { IdPipe } from '../platform/id.pipe';
import { ProductDto, NewProductDto } from './dto/product.dto';
import { SetUpProductsService } from './products.service';

@ApiTags('set-up')
@Controller()
export class SetUpProductsController {
  constructor(private readonly products: SetUpProductsService) {}

  @Get('plants/:id/set-up/products')
  @Permit('read')
  list(@CurrentPerson() person: Person, @Param('id', IdPipe) plantId: number): Promise<Page<ProductSetUpView>> {
    return this.products.list(person, plantId);
  }

  @Post('plants/:id/set-up/products')
  @Permit('set_up_plant')
  add(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) plantId: number,
    @Body() body: NewProductDto,
  ): Promise<ProductSetUpView> {
    return this.products.add(person, plantId, body);
  }

  @Patch('products/:id')
  @Permit('set_up_plant')
  change(
    @CurrentPerson() person: Person,
    @Param('id', IdPipe) id: number,
    @Body() body: ProductDto,
  ): Promise<ProductSetUpView> {
    return this.products.change(person, id, body);
  }
}
