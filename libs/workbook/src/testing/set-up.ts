import { Workbook } from 'exceljs';
import type { SetUpDocument } from '../set-up/document';

/** An invented plant's set-up with every kind of cell in it. */
export const SET_UP: SetUpDocument = {
  plant: [
    {
      name: 'Overdale Films',
      timeZone: 'America/Toronto',
      currency: 'CAD',
      engineerMayRelease: true,
      reminderManagerHours: 8,
      reminderDirectorHours: 24,
      allowanceNoticePercent: 10,
      allowanceCapPercent: 25,
    },
  ],
  shifts: [
    { name: 'day', startsAt: '07:00', endsAt: '19:00', validFrom: '2026-01-05' },
    { name: 'night', startsAt: '19:00', endsAt: '07:00', validFrom: '2026-01-05' },
  ],
  lines: [{ name: 'Coater 1' }, { name: 'Slitter 4' }],
  products: [
    { code: 'OF-20', name: 'Film 20 µm', valuePerUnit: 0.42 },
    { code: 'OF-25', name: 'Film 25 µm', valuePerUnit: null },
  ],
  characteristics: [
    { name: 'Thickness', unit: 'µm', resolution: 0.1 },
    { name: 'pH', unit: '', resolution: 0.01 },
  ],
  specifications: [
    {
      product: 'OF-20',
      characteristic: 'Thickness',
      nominal: 20,
      lower: 19.2,
      upper: 20.8,
      appliesToIndividuals: true,
      validFrom: Date.parse('2026-01-05T12:00:00Z'),
    },
    {
      product: 'OF-25',
      characteristic: 'pH',
      nominal: 7,
      lower: 6.5,
      upper: null,
      appliesToIndividuals: false,
      validFrom: null,
    },
  ],
  gauges: [
    { assetNumber: 'OF-L1', kind: 'laser gauge' },
    { assetNumber: 'OF-P2', kind: 'pH probe' },
  ],
  channels: [
    {
      line: 'Coater 1',
      name: 'Thickness',
      characteristic: 'Thickness',
      position: 'exit',
      gauge: 'OF-L1',
      gaugeSince: Date.parse('1998-07-01T04:30:00Z'),
    },
    {
      line: 'Slitter 4',
      name: 'Thickness',
      characteristic: 'Thickness',
      position: 'unwind',
      gauge: 'OF-L1',
      gaugeSince: Date.parse('2026-01-05T12:00:00Z'),
    },
    { line: 'Coater 1', name: 'pH', characteristic: 'pH', position: 'tank', gauge: null, gaugeSince: null },
  ],
  people: [
    { email: 'ines@overdale.example', name: 'Ines Roy', roles: ['administrator'], lines: [] },
    {
      email: 'tom@overdale.example',
      name: 'Tom Abel',
      roles: ['engineer', 'line_lead'],
      lines: ['Coater 1', 'Slitter 4'],
    },
  ],
};

/** The workbook with something done to it, as a person would in Excel. */
export async function editBook(bytes: Buffer, edit: (book: Workbook) => void): Promise<Buffer> {
  const book = new Workbook();
  await book.xlsx.load(bytes as unknown as ArrayBuffer);
  edit(book);
  return Buffer.from(await book.xlsx.writeBuffer());
}
