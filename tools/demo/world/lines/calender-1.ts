import type { LineModel } from './line-model';

/** Presses the base film to its thickness between two heated rolls. */
export const CALENDER_1: LineModel = {
  line: {
    name: 'Calender 1',
    lotsPerShift: 4,
    firstLotNumber: 51001,
    products: [
      { code: 'BF-12', name: 'Calendered base film, 12 µm', quantityUnit: 'm²', valuePerUnit: 0.21 },
      { code: 'BF-14', name: 'Calendered base film, 14 µm', quantityUnit: 'm²', valuePerUnit: 0.23 },
    ],
    channels: [
      {
        name: 'Thickness',
        characteristic: { name: 'Thickness', unit: 'µm', resolution: 0.01 },
        gauge: { assetNumber: 'MW-0305', kind: 'Contact thickness gauge', position: 'Behind the nip, web centre' },
        readingsPerShift: 40,
        specifications: {
          'BF-12': { nominal: 12, lower: 11.6, upper: 12.4 },
          'BF-14': { nominal: 14, lower: 13.6, upper: 14.4 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 0.08,
        allowanceCap: 0.2,
      },
      {
        name: 'Nip force',
        characteristic: { name: 'Nip force', unit: 'kN', resolution: 0.1 },
        gauge: {
          assetNumber: 'MW-0308',
          kind: 'Load cell',
          position: 'Under the drive-side bearing of the lower roll',
        },
        readingsPerShift: 40,
        specifications: {
          'BF-12': { nominal: 48, lower: 44, upper: 52 },
          'BF-14': { nominal: 42, lower: 38, upper: 46 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 0.8,
        allowanceCap: 2,
      },
    ],
  },
  scatter: {
    Thickness: { betweenLots: 0.025, betweenReadings: 0.05, swingAmplitude: 0 },
    'Nip force': { betweenLots: 0.25, betweenReadings: 0.3, swingAmplitude: 0 },
  },
  campaign: '111100011000',
  quantityPerLot: 3480,
};
