import type { Conflict } from '@app/data';

/** What the database refuses of a set-up, in words. */
export const SET_UP_CONFLICTS: Record<string, Conflict> = {
  plants_name_key: { code: 'name-taken', pointer: '/name', detail: 'Another plant has this name. Choose another one.' },
  lines_name_key: {
    code: 'name-taken',
    pointer: '/name',
    detail: 'Another line of the plant has this name. Choose another one, or bring that line back into use.',
  },
  products_code_key: {
    code: 'code-taken',
    pointer: '/code',
    detail: 'Another product of the plant has this code. Choose another one, or bring that product back into use.',
  },
  characteristics_name_key: {
    code: 'name-taken',
    pointer: '/name',
    detail:
      'Another characteristic of the plant has this name. Choose another one, or bring that characteristic back into use.',
  },
  gauges_asset_number_key: {
    code: 'asset-number-taken',
    pointer: '/assetNumber',
    detail: 'Another gauge of the plant has this asset number. Put it right, or bring that gauge back into use.',
  },
  channels_name_key: {
    code: 'name-taken',
    pointer: '/name',
    detail: 'Another channel of the line has this name. Choose another one, or bring that channel back into use.',
  },
  channels_place_key: {
    code: 'place-taken',
    pointer: '/position',
    detail:
      'Another channel measures this characteristic at this position of the line. Choose another position, or bring that channel back into use.',
  },
  channel_gauges_no_overlap: {
    code: 'gauge-overlap',
    pointer: '/since',
    detail: 'Another gauge served the channel at this time. Give a later one.',
  },
  shifts_no_overlap: {
    code: 'shifts-overlap',
    pointer: '/shifts',
    detail: 'Two shifts overlap. Give spans that follow each other.',
  },
  specification_proposals_one_pending: {
    code: 'proposal-pending',
    pointer: '/characteristicId',
    detail:
      'A new version for this product and characteristic waits for approval already. Approve or withdraw it first.',
  },
  specifications_no_overlap: {
    code: 'specification-overlap',
    pointer: '/validFrom',
    detail: 'Another version holds from then on. Withdraw the proposal and give a later time.',
  },
};
