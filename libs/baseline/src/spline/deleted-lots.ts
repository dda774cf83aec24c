export type { DeletedLot } from '../baseline-fit';
export type { FilteredSeries } from './filtered-series';
export { LotDeleter } from './lot-deletion';
