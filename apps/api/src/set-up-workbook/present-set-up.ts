import {
  findPlantSetUp,
  listChannelSetUps,
  listCharacteristicSetUps,
  listGaugeSetUps,
  listLineSetUps,
  listPlantPeople,
  listProductSetUps,
  listShifts,
  type PlantSetUpRow,
  type Queryable,
} from '@app/data';
import { identityOf, type SetUpDocument, type SheetKey } from '@app/workbook';
import { calendarsView } from '../set-up/shifts';
import { presentSpecifications } from './present-specifications';

/** What is there, as a workbook would say it. */
export interface PresentSetUp {
  /** Without what is retired. */
  document: SetUpDocument;
  /** By sheet and by what names a row, retired ones too. */
  ids: Record<SheetKey, Map<string, number>>;
  retired: Record<SheetKey, Set<string>>;
  /** The newest approved version of each specification, also where another one waits for approval. */
  newestVersions: Map<string, SetUpDocument['specifications'][number]>;
  /** Lines that a person is assigned to and that the workbook does not name, since they are retired. */
  retiredLineIds: Map<string, number[]>;
}

const none = <T>(make: () => T): Record<SheetKey, T> => ({
  plant: make(),
  shifts: make(),
  lines: make(),
  products: make(),
  characteristics: make(),
  specifications: make(),
  gauges: make(),
  channels: make(),
  people: make(),
});

const percent = (share: number): number => Number((share * 100).toPrecision(15));

/** Reads a plant's whole set-up. */
export async function readPresentSetUp(db: Queryable, plantId: number): Promise<PresentSetUp> {
  const plant = (await findPlantSetUp(db, plantId)) as PlantSetUpRow;
  const lines = await listLineSetUps(db, plantId);
  const products = await listProductSetUps(db, plantId);
  const characteristics = await listCharacteristicSetUps(db, plantId);
  const gauges = await listGaugeSetUps(db, plantId);
  const channels = await listChannelSetUps(db, plantId);
  const people = await listPlantPeople(db, plantId);
  const [calendar] = calendarsView(await listShifts(db, plantId)).calendars;
  const specifications = await presentSpecifications(db, plantId, products, characteristics);
  const lineNames = new Map(lines.filter((line) => !line.isRetired).map((line) => [line.id, line.name]));

  const ids = none(() => new Map<string, number>());
  const retired = none(() => new Set<string>());
  function take<K extends SheetKey, T extends { id: number; isRetired?: boolean }>(
    sheet: K,
    things: T[],
    toRow: (thing: T) => SetUpDocument[K][number],
  ): SetUpDocument[K] {
    const rows = things.flatMap((thing) => {
      const row = toRow(thing);
      const key = identityOf(sheet, row);
      ids[sheet].set(key, thing.id);
      if (thing.isRetired) retired[sheet].add(key);
      return thing.isRetired ? [] : [row];
    });
    return rows as SetUpDocument[K];
  }
  const document: SetUpDocument = {
    plant: [
      {
        name: plant.name,
        timeZone: plant.timeZone,
        currency: plant.currency,
        engineerMayRelease: plant.engineerMayRelease,
        reminderManagerHours: plant.reminderManagerHours,
        reminderDirectorHours: plant.reminderDirectorHours,
        allowanceNoticePercent: percent(plant.allowanceNoticeShare),
        allowanceCapPercent: percent(plant.allowanceCapShare),
      },
    ],
    shifts: (calendar?.shifts ?? []).map((shift) => ({ ...shift, validFrom: calendar.validFrom })),
    lines: take('lines', lines, ({ name }) => ({ name })),
    products: take('products', products, ({ code, name, valuePerUnit }) => ({ code, name, valuePerUnit })),
    characteristics: take('characteristics', characteristics, ({ name, unit, resolution }) => ({
      name,
      unit,
      resolution,
    })),
    specifications: specifications.rows,
    gauges: take('gauges', gauges, ({ assetNumber, kind }) => ({ assetNumber, kind })),
    channels: take('channels', channels, (channel) => {
      const serving = channel.gauges.find(({ until }) => until === null);
      return {
        line: channel.lineName,
        name: channel.name,
        characteristic: channel.characteristicName,
        position: channel.position,
        gauge: serving?.assetNumber ?? null,
        gaugeSince: serving ? Date.parse(serving.since) : null,
      };
    }),
    people: take('people', people, ({ email, name, roles, lineIds }) => ({
      email,
      name,
      roles,
      lines: lineIds.flatMap((id) => lineNames.get(id) ?? []),
    })),
  };
  const retiredLineIds = new Map(
    people.map(({ email, lineIds }) => [email, lineIds.filter((id) => !lineNames.has(id))]),
  );
  return { document, ids, retired, newestVersions: specifications.newestVersions, retiredLineIds };
}
