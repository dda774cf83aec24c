import { Workbook } from 'exceljs';
import { ofPlant, type Rows, settingUp } from '../row';
import type { World } from '../world';

/** The plant's own set-up, with the product called otherwise. */
async function changedWorkbook({ app, plant, as }: World): Promise<Buffer> {
  const path = `/api/plants/${plant.id}/set-up/workbook`;
  const answer = await app.http.get(path).set(as.admin).buffer(true).responseType('blob').expect(200);
  const book = new Workbook();
  await book.xlsx.load(answer.body as never);
  book.getWorksheet('Products')?.eachRow((row) =>
    row.eachCell((cell) => {
      if (cell.value === 'Separator 16') cell.value = 'Separator film 16';
    }),
  );
  return Buffer.from(await book.xlsx.writeBuffer());
}

export const SET_UP_WORKBOOK_ROWS: Rows = {
  'GET /api/plants/{id}/set-up/workbook': { ...settingUp, ...ofPlant },
  'POST /api/plants/{id}/set-up/workbook': {
    ...settingUp,
    asked: (world) => ({
      ...ofPlant.asked?.(world),
      query: { confirm: 'no' },
      file: { name: 'set-up.xlsx', bytes: Buffer.from('no workbook') },
    }),
    write: {
      by: 'admin',
      prepare: async (world) => ({
        ...ofPlant.asked?.(world),
        query: { confirm: 'yes' },
        file: { name: 'set-up.xlsx', bytes: await changedWorkbook(world) },
      }),
      entry: {
        sentence: /^admin applied the set-up in set-up\.xlsx\. /,
        kind: 'plant',
        thing: (world) => world.plant.id,
      },
      also: [
        { sentence: /^admin changed product SEP-16: name from Separator 16 to Separator film 16\.$/, kind: 'product' },
      ],
    },
  },
};
