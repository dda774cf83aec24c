import type { Entry, Row, Rows } from '../row';
import { ofPlant, sending, settingUp } from '../row';
import type { World } from '../world';

const answered: Entry['thing'] = (_, { answer }) => answer.id as number;
const asked: Entry['thing'] = (_, done) => done.asked.at?.id as number;

const list: Row = { who: 'read lines, lots, records, holds, gauges', permission: 'read', ...ofPlant };

/** A thing that is added to the plant. */
const added = (kind: string, sentence: RegExp, body: object | ((world: World) => object)): Row => ({
  ...settingUp,
  ...sending(ofPlant, body),
  write: { by: 'admin', entry: { sentence, kind, thing: answered } },
});

/** A thing of the plant that is changed. */
const changed = (kind: string, sentence: RegExp, id: (world: World) => number, body: object): Row => ({
  ...settingUp,
  asked: (world) => ({ at: { id: id(world) }, body }),
  write: { by: 'admin', entry: { sentence, kind, thing: asked } },
});

/** Lines, products, characteristics, gauges and channels: each is listed, added and changed alike. */
export const SET_UP_THING_ROWS: Rows = {
  'GET /api/plants/{id}/set-up/lines': list,
  'POST /api/plants/{id}/set-up/lines': added('line', /^admin added line Slitter 4\.$/, { name: 'Slitter 4' }),
  'PATCH /api/lines/{id}': changed(
    'line',
    /^admin changed line Calender 1: name from Calender 1 to Calender 3\.$/,
    ({ plant }) => plant.lines[1].id,
    { name: 'Calender 3' },
  ),
  'GET /api/plants/{id}/set-up/products': list,
  'POST /api/plants/{id}/set-up/products': added('product', /^admin added product SEP-20\.$/, {
    code: 'SEP-20',
    name: 'Separator 20',
  }),
  'PATCH /api/products/{id}': changed('product', /^admin changed product SEP-16: /, ({ plant }) => plant.productId, {
    valuePerUnit: 1.5,
  }),
  'GET /api/plants/{id}/set-up/characteristics': list,
  'POST /api/plants/{id}/set-up/characteristics': added('characteristic', /^admin added characteristic Nip force\.$/, {
    name: 'Nip force',
    unit: 'kN',
    resolution: 0.1,
  }),
  'PATCH /api/characteristics/{id}': changed(
    'characteristic',
    /^admin changed characteristic Web thickness: /,
    ({ plant }) => plant.channels[1].characteristicId,
    { resolution: 0.2 },
  ),
  'GET /api/plants/{id}/set-up/gauges': list,
  'POST /api/plants/{id}/set-up/gauges': added('gauge', /^admin added gauge LT-200\.$/, {
    assetNumber: 'LT-200',
    kind: 'laser gauge',
  }),
  'PATCH /api/gauges/{id}': changed(
    'gauge',
    /^admin changed gauge LT-118: /,
    ({ plant }) => plant.channels[1].gaugeId,
    {
      kind: 'twin laser gauge',
    },
  ),
  'GET /api/plants/{id}/set-up/channels': list,
  'POST /api/plants/{id}/set-up/channels': added(
    'channel',
    /^admin added channel Thickness after the nip on .* by LT-120\.$/,
    ({ plant, spareGaugeId }) => ({
      lineId: plant.lines[1].id,
      characteristicId: plant.channels[1].characteristicId,
      position: 'after the nip',
      name: 'Thickness after the nip',
      gaugeId: spareGaugeId,
      since: '2026-03-01T06:00:00Z',
    }),
  ),
  'PATCH /api/channels/{id}': changed(
    'channel',
    /^admin changed channel Web thickness of Coater 2: /,
    ({ plant }) => plant.channels[1].id,
    {
      position: 'exit',
    },
  ),
  'POST /api/channels/{id}/gauges': {
    ...settingUp,
    asked: ({ plant, spareGaugeId }) => ({
      at: { id: plant.channels[1].id },
      body: { gaugeId: spareGaugeId, since: '2026-03-10T06:00:00Z' },
    }),
    write: {
      by: 'admin',
      entry: {
        sentence: /^admin let gauge LT-120 serve Web thickness of Coater 2 after LT-118\.$/,
        kind: 'channel',
        thing: asked,
      },
    },
  },
};
