import { rows, type Queryable } from './database';

/** What a line's workbooks may name: its channels in use, with the names a column may have for them, and the plant's products in use. */
export interface LineContextRow {
  timeZone: string;
  channels: {
    id: number;
    name: string;
    aliases: string[];
    unit: string;
    /** The newest version of each product's specification, by the product's code. */
    specifications: { product: string; nominal: number | null; lower: number | null; upper: number | null }[];
  }[];
  products: { code: string; name: string }[];
}

export async function getLineContext(
  db: Queryable,
  lineId: number,
  { isWithRetired = false } = {},
): Promise<LineContextRow> {
  const [plant] = await rows<{ id: number; timeZone: string }>(
    db,
    `select p.id, p.time_zone as "timeZone" from plants p join lines l on l.plant_id = p.id where l.id = :lineId`,
    { lineId },
  );
  const channels = await rows<LineContextRow['channels'][number]>(
    db,
    `select c.id, c.name, x.unit, array_remove(array_cat(array[x.name, c.position],
       array(select g.asset_number from channel_gauges cg join gauges g on g.id = cg.gauge_id where cg.channel_id = c.id
         and 1 = (select count(distinct o.channel_id) from channel_gauges o join channels d on d.id = o.channel_id
           where o.gauge_id = g.id and d.retired_at is null))), c.name) as aliases,
       (select coalesce(json_agg(json_build_object('product', p.code, 'nominal', s.nominal, 'lower', s.lower, 'upper', s.upper) order by p.code), '[]')
         from specifications s join products p on p.id = s.product_id
         where s.characteristic_id = x.id and upper_inf(s.valid) and p.retired_at is null) as specifications
     from channels c join characteristics x on x.id = c.characteristic_id where c.line_id = :lineId and (:isWithRetired or c.retired_at is null) order by c.id`,
    { lineId, isWithRetired },
  );
  const products = await rows<{ code: string; name: string }>(
    db,
    'select code, name from products where plant_id = :id and retired_at is null order by code',
    {
      id: plant.id,
    },
  );
  return { timeZone: plant.timeZone, channels: withUnambiguousAliases(channels), products };
}

/** A name that two channels of the line share names neither. */
function withUnambiguousAliases(channels: LineContextRow['channels']): LineContextRow['channels'] {
  const uses = new Map<string, number>();
  for (const channel of channels)
    for (const name of new Set([channel.name, ...channel.aliases]))
      uses.set(name.toLowerCase(), (uses.get(name.toLowerCase()) ?? 0) + 1);
  return channels.map((channel) => ({
    ...channel,
    aliases: channel.aliases.filter((name) => uses.get(name.toLowerCase()) === 1),
  }));
}
