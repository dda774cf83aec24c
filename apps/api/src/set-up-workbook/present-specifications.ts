import {
  type CharacteristicSetUpRow,
  listSpecificationProposals,
  listSpecificationVersions,
  type ProductSetUpRow,
  type Queryable,
} from '@app/data';
import { identityOf, type SetUpDocument } from '@app/workbook';

type Row = SetUpDocument['specifications'][number];

/** A row a product and characteristic in use: what waits for approval, or else the newest version. */
export async function presentSpecifications(
  db: Queryable,
  plantId: number,
  products: ProductSetUpRow[],
  characteristics: CharacteristicSetUpRow[],
): Promise<{ rows: Row[]; newestVersions: Map<string, Row> }> {
  const codes = new Map(products.filter((one) => !one.isRetired).map((one) => [one.id, one.code]));
  const names = new Map(characteristics.filter((one) => !one.isRetired).map((one) => [one.id, one.name]));
  const toRow = (one: Omit<Row, 'product' | 'characteristic' | 'validFrom'> & Ids): Row[] => {
    const [product, characteristic] = [codes.get(one.productId), names.get(one.characteristicId)];
    if (product === undefined || characteristic === undefined) return [];
    const { nominal, lower, upper, appliesToIndividuals, validFrom } = one;
    return [
      { product, characteristic, nominal, lower, upper, appliesToIndividuals, validFrom: validFrom?.getTime() ?? null },
    ];
  };
  const newestVersions = new Map<string, Row>();
  for (const row of (await listSpecificationVersions(db, plantId)).flatMap(toRow)) {
    const key = identityOf('specifications', row);
    if (!newestVersions.has(key)) newestVersions.set(key, row);
  }
  const all = new Map(newestVersions);
  for (const row of (await listSpecificationProposals(db, plantId)).flatMap(toRow))
    all.set(identityOf('specifications', row), row);
  return { rows: [...all].sort(([one], [other]) => (one < other ? -1 : 1)).map(([, row]) => row), newestVersions };
}

interface Ids {
  productId: number;
  characteristicId: number;
  validFrom: Date | null;
}
