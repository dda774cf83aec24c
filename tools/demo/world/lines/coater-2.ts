import type { LineModel } from './line-model';

/** Coats the ceramic slurry on separator film: weight by beta gauge, thickness by laser, temperature at the oven's exit. */
export const COATER_2: LineModel = {
  line: {
    name: 'Coater 2',
    lotsPerShift: 4,
    firstLotNumber: 24001,
    products: [
      { code: 'CS-16', name: 'Coated separator, 16 µm', quantityUnit: 'm²', valuePerUnit: 0.62 },
      { code: 'CS-20', name: 'Coated separator, 20 µm', quantityUnit: 'm²', valuePerUnit: 0.7 },
    ],
    channels: [
      {
        name: 'Coat weight',
        characteristic: { name: 'Coat weight', unit: 'g/m²', resolution: 0.01 },
        gauge: { assetNumber: 'MW-0217', kind: 'Beta gauge', position: 'After the oven, on the scanning frame' },
        readingsPerShift: 480,
        specifications: {
          'CS-16': { nominal: 5.2, lower: 4.5, upper: 5.9 },
          'CS-20': { nominal: 6.4, lower: 5.7, upper: 7.1 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 0.14,
        allowanceCap: 0.35,
      },
      {
        name: 'Web thickness',
        characteristic: { name: 'Web thickness', unit: 'µm', resolution: 0.1 },
        gauge: { assetNumber: 'MW-0231', kind: 'Laser thickness gauge', position: 'Before the winder, web centre' },
        readingsPerShift: 40,
        specifications: {
          'CS-16': { nominal: 16, lower: 14.5, upper: 17.5 },
          'CS-20': { nominal: 20, lower: 18.5, upper: 21.5 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 0.3,
        allowanceCap: 0.75,
      },
      {
        name: 'Oven exit temperature',
        characteristic: { name: 'Oven exit temperature', unit: '°C', resolution: 0.1 },
        gauge: { assetNumber: 'MW-0174', kind: 'Infrared thermometer', position: 'Oven exit, above the web' },
        readingsPerShift: 40,
        specifications: {
          'CS-16': { nominal: 84, lower: 76, upper: 92 },
          'CS-20': { nominal: 88, lower: 80, upper: 96 },
        },
        appliesToIndividuals: true,
        allowanceNotice: 1.6,
        allowanceCap: 4,
      },
    ],
  },
  scatter: {
    'Coat weight': { betweenLots: 0.03, betweenReadings: 0.06, swingAmplitude: 0 },
    'Web thickness': { betweenLots: 0.06, betweenReadings: 0.12, swingAmplitude: 0.05 },
    'Oven exit temperature': { betweenLots: 0.3, betweenReadings: 0.4, swingAmplitude: 0.5 },
  },
  campaign: '000111100011',
  quantityPerLot: 2160,
};
