import { minutesOf, shiftErrors } from './shift-spans';

const span = (name: string, startsAt: string, endsAt: string) => ({ name, startsAt, endsAt });

describe('the shifts of a day', () => {
  it('may run over midnight, in two pieces', () => {
    expect(minutesOf(span('early', '06:00', '14:00'))).toBe('{[360,840)}');
    expect(minutesOf(span('night', '22:00', '06:00'))).toBe('{[1320,1440),[0,360)}');
    expect(minutesOf(span('late', '14:00', '00:00'))).toBe('{[840,1440)}');
    expect(minutesOf(span('whole', '00:00', '00:00'))).toBe('{[0,1440)}');
    expect(minutesOf(span('whole', '06:00', '06:00'))).toBe('{[360,1440),[0,360)}');
  });

  it('follow each other without overlap', () => {
    const day = [span('early', '06:00', '14:00'), span('late', '14:00', '22:00'), span('night', '22:00', '06:00')];
    expect(shiftErrors(day)).toEqual([]);
    expect(shiftErrors([...day].reverse())).toEqual([]);
  });

  it('overlap where one begins before the other ends, also after midnight', () => {
    const errors = shiftErrors([span('night', '22:00', '06:30'), span('early', '06:00', '14:00')]);
    expect(errors).toEqual([
      { pointer: '/shifts/1/startsAt', code: 'shifts-overlap', detail: 'This overlaps night, 22:00 to 06:30.' },
    ]);
    expect(shiftErrors([span('whole', '05:00', '05:00'), span('odd', '04:59', '05:00')])).toHaveLength(1);
  });

  it('have a name each', () => {
    const errors = shiftErrors([span('Early', '06:00', '14:00'), span('early', '14:00', '22:00')]);
    expect(errors.map(({ pointer, code }) => [pointer, code])).toEqual([['/shifts/1/name', 'name-taken']]);
  });
});
