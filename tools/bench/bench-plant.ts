import { hash } from '@node-rs/argon2';
import { createDatabase } from '@app/data';
import { seedPlant, type SeededPlant } from '../../database/seeds/plant-seed';

export const PASSWORD = 'bench-password';
export const CHANNELS = Array.from({ length: 8 }, (_, index) => `Zone ${index + 1}`);
export const LINE = 'Line 1';
export const LOTS_PER_SHIFT = 12;
export const SHIFT_SECONDS = 8 * 3600;
export const PRODUCT = 'P-1';

/** One line of eight channels, an engineer and a manager. */
export async function seedBenchPlant(databaseUrl: string, at: Date): Promise<SeededPlant> {
  const database = createDatabase(databaseUrl, { min: 0, max: 1 });
  const passwordHash = await hash(PASSWORD);
  try {
    return await seedPlant(database, {
      name: 'Bench Works',
      timeZone: 'UTC',
      isDemo: false,
      at,
      shifts: [{ name: 'day', startsAt: '06:00', endsAt: '14:00' }],
      people: [
        { email: 'engineer@bench.example', name: 'Engineer', role: 'engineer', lines: [LINE], passwordHash },
        { email: 'manager@bench.example', name: 'Manager', role: 'quality_manager', lines: [LINE], passwordHash },
      ],
      lines: [
        {
          name: LINE,
          products: [{ code: PRODUCT, name: 'Product 1' }],
          channels: CHANNELS.map((name, index) => ({
            name,
            characteristic: { name, unit: 'mm', resolution: 0.001 },
            gauge: { assetNumber: `B-${index + 1}`, kind: 'gauge', position: `zone ${index + 1}` },
            specifications: { [PRODUCT]: { nominal: 10, lower: 8, upper: 12 } },
            appliesToIndividuals: true,
          })),
        },
      ],
    });
  } finally {
    await database.destroy();
  }
}
