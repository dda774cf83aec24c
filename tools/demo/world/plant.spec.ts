import { describePlant, lineNamed } from '.';

describe('Marrowby Works', () => {
  const plant = describePlant();

  it('has three lines with the channels of the demo, two products a line', () => {
    expect(plant.lines.map(({ name, channels }) => [name, channels.map((channel) => channel.name)])).toEqual([
      ['Coater 2', ['Coat weight', 'Web thickness', 'Oven exit temperature']],
      ['Calender 1', ['Thickness', 'Nip force']],
      ['Slurry 3', ['Viscosity', 'pH', 'Density']],
    ]);
    expect(plant.lines.map(({ products }) => products.length)).toEqual([2, 2, 2]);
  });

  it('has a person for each demo sign-in, with addresses that end in .example', () => {
    const names = ['engineer', 'engineer2', 'manager', 'lead', 'technician', 'director', 'admin'];
    expect(plant.people.map(({ email }) => email)).toEqual(names.map((name) => `${name}@marrowby.example`));
    expect(new Set(plant.people.map(({ name }) => name)).size).toBe(names.length);
  });

  it('has asset numbers that occur once and specifications around the nominal value for every product', () => {
    const channels = plant.lines.flatMap((line) => line.channels);
    expect(new Set(channels.map(({ gauge }) => gauge.assetNumber)).size).toBe(channels.length);
    for (const line of plant.lines) {
      for (const { specifications } of line.channels) {
        expect(Object.keys(specifications)).toEqual(line.products.map(({ code }) => code));
        for (const { nominal, lower, upper } of Object.values(specifications)) {
          expect(lower).toBeLessThan(nominal);
          expect(nominal).toBeLessThan(upper);
        }
      }
    }
  });

  it('allows a tenth of the tolerance before it gives notice, and a quarter at most', () => {
    for (const channel of plant.lines.flatMap((line) => line.channels)) {
      for (const { lower, upper } of Object.values(channel.specifications)) {
        expect(channel.allowanceNotice).toBeCloseTo(0.1 * (upper - lower), 9);
        expect(channel.allowanceCap).toBeCloseTo(0.25 * (upper - lower), 9);
      }
    }
  });

  it('gives a copy, so that a caller cannot change the plant for the next', () => {
    describePlant().lines[0].name = 'Other';
    expect(describePlant().lines[0].name).toBe('Coater 2');
  });

  it('refuses a line that it does not have', () => {
    expect(() => lineNamed('Coater 9')).toThrow('no line "Coater 9"');
  });
});
