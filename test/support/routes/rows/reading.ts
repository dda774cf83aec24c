import { ofChannel, ofHold, ofIntake, ofLine, ofLot, ofOneself, ofPlan, ofPlant, reading, type Rows } from '../row';

export const READING_ROWS: Rows = {
  'GET /api/plants': ofOneself,
  'GET /api/plants/{id}/lines': { ...reading, ...ofPlant },
  'GET /api/lines/{id}/strip': { ...reading, ...ofLine },
  'GET /api/lines/{id}/channels': { ...reading, ...ofLine },
  'GET /api/lines/{id}/intakes': { ...reading, ...ofLine },
  'GET /api/channels/{id}': { ...reading, ...ofChannel },
  'GET /api/channels/{id}/record': { ...reading, ...ofChannel },
  'GET /api/channels/{id}/plans': { ...reading, ...ofChannel },
  'GET /api/plans/{id}': { ...reading, ...ofPlan },
  'GET /api/lots': { ...reading, asked: ({ plant }) => ({ query: { plantId: plant.id } }) },
  'GET /api/lots/{id}': { ...reading, ...ofLot },
  'GET /api/holds': { ...reading, asked: ({ plant }) => ({ query: { plantId: plant.id } }) },
  'GET /api/holds/{id}': { ...reading, ...ofHold },
  'GET /api/desk': { ...reading, asked: ({ plant }) => ({ query: { plantId: plant.id } }) },
  'GET /api/intakes/{id}': { ...reading, ...ofIntake },
  'GET /api/intakes/{id}/events': { ...reading, ...ofIntake, isStream: true },
  'GET /api/intakes/{id}/workbook': { ...reading, ...ofIntake },
  'GET /api/plants/{id}/audit': { who: 'audit', permission: 'read_audit', ...ofPlant },
  'GET /api/plants/{id}/audit/filters': { who: 'audit', permission: 'read_audit', ...ofPlant },
  'GET /api/plants/{id}/audit/export': { who: 'audit', permission: 'read_audit', ...ofPlant },
};
