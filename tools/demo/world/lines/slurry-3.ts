import type { LineModel } from './line-model';

/** Mixes the ceramic slurry that the coaters use. */
export const SLURRY_3: LineModel = {
  line: {
    name: 'Slurry 3',
    lotsPerShift: 4,
    firstLotNumber: 73001,
    products: [
      { code: 'SL-A', name: 'Alumina slurry, thin', quantityUnit: 'kg', valuePerUnit: 1.9 },
      { code: 'SL-B', name: 'Alumina slurry, thick', quantityUnit: 'kg', valuePerUnit: 2.3 },
    ],
    channels: [
      {
        name: 'Viscosity',
        characteristic: { name: 'Viscosity', unit: 'mPa·s', resolution: 1 },
        gauge: { assetNumber: 'MW-0412', kind: 'Torsional viscometer', position: 'Discharge line of the day tank' },
        readingsPerShift: 40,
        specifications: {
          'SL-A': { nominal: 320, lower: 260, upper: 380 },
          'SL-B': { nominal: 380, lower: 320, upper: 440 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 12,
        allowanceCap: 30,
      },
      {
        name: 'pH',
        characteristic: { name: 'pH', unit: '', resolution: 0.01 },
        gauge: { assetNumber: 'MW-0415', kind: 'pH electrode', position: 'Recirculation loop of the day tank' },
        readingsPerShift: 40,
        specifications: {
          'SL-A': { nominal: 9.1, lower: 8.7, upper: 9.5 },
          'SL-B': { nominal: 9.3, lower: 8.9, upper: 9.7 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 0.08,
        allowanceCap: 0.2,
      },
      {
        name: 'Density',
        characteristic: { name: 'Density', unit: 'kg/m³', resolution: 1 },
        gauge: {
          assetNumber: 'MW-0419',
          kind: 'Vibrating-tube density meter',
          position: 'Discharge line of the day tank',
        },
        readingsPerShift: 40,
        specifications: {
          'SL-A': { nominal: 1240, lower: 1215, upper: 1265 },
          'SL-B': { nominal: 1310, lower: 1285, upper: 1335 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 5,
        allowanceCap: 12.5,
      },
    ],
  },
  scatter: {
    Viscosity: { betweenLots: 4, betweenReadings: 6, swingAmplitude: 0 },
    pH: { betweenLots: 0.03, betweenReadings: 0.025, swingAmplitude: 0 },
    Density: { betweenLots: 1.5, betweenReadings: 2, swingAmplitude: 0 },
  },
  campaign: '001111000110',
  quantityPerLot: 640,
};
