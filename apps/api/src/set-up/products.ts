import type { NewProductBody, ProductBody, ProductSetUpView } from '@app/contracts';
import {
  findProductSetUpForUpdate,
  insertProduct,
  type ProductSetUpRow,
  type Transaction,
  updateProduct,
} from '@app/data';
import { notFound } from '../access/not-found';
import { auditAdded, auditChanged, type Change, differences, refusal, retiredAt } from './change';

const WORDS = { code: 'code', name: 'name', valuePerUnit: 'value of one unit' };

export const productView = ({ id, code, name, valuePerUnit, isRetired }: ProductSetUpRow): ProductSetUpView => ({
  id,
  code,
  name,
  valuePerUnit,
  isRetired,
});

/** Adds a product; returns its id. */
export async function addProduct(tx: Transaction, change: Change, body: NewProductBody): Promise<number> {
  const product = { code: body.code, name: body.name, valuePerUnit: body.valuePerUnit ?? null };
  const id = await insertProduct(tx, { plantId: change.plantId, ...product });
  await auditAdded(tx, change, { kind: 'product', id, title: `product ${product.code}` }, product);
  return id;
}

/** Changes a product, retires it or brings it back. */
export async function changeProduct(tx: Transaction, change: Change, id: number, body: ProductBody): Promise<void> {
  const product = await findProductSetUpForUpdate(tx, id);
  if (product?.plantId !== change.plantId) throw notFound();
  const { code, name, valuePerUnit, isRetired } = product;
  const differing = differences({ code, name, valuePerUnit, isRetired }, body);
  if (!differing) return;
  const { after } = differing;
  if (after.isRetired) refuseRetiring(product);
  await updateProduct(tx, id, {
    code: after.code,
    name: after.name,
    valuePerUnit: after.valuePerUnit,
    retiredAt: retiredAt(after.isRetired, change.at),
  });
  await auditChanged(tx, change, { kind: 'product', id, title: `product ${code}`, words: WORDS }, differing);
}

function refuseRetiring({ code, openHoldCount, proposalCount }: ProductSetUpRow): void {
  if (openHoldCount > 0) {
    const lots = openHoldCount === 1 ? '1 lot of it is' : `${openHoldCount} lots of it are`;
    throw refusal(
      'product-in-use',
      '/isRetired',
      `${code} cannot be retired while ${lots} held and undecided. Decide first.`,
    );
  }
  if (proposalCount > 0)
    throw refusal(
      'product-in-use',
      '/isRetired',
      `${code} cannot be retired while a specification of it waits for approval. Approve or withdraw it first.`,
    );
}
