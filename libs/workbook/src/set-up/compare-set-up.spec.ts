import { SET_UP } from '../testing/set-up';
import { sheetSentences, sheetSummary } from './change-words';
import { compareSetUps } from './compare-set-up';
import type { SetUpDocument } from './document';

const changed = (change: (document: SetUpDocument) => void): SetUpDocument => {
  const document = structuredClone(SET_UP);
  change(document);
  return document;
};

/** Every sentence that is said of what `wanted` changes. */
function sentences(wanted: SetUpDocument): string[] {
  return compareSetUps(SET_UP, wanted).flatMap((sheet) => sheetSentences(sheet, { present: SET_UP, wanted }));
}
const summaries = (wanted: SetUpDocument) => compareSetUps(SET_UP, wanted).map((sheet) => sheetSummary(sheet));

describe('what a workbook would change', () => {
  it('is nothing when it says what is there, in whatever order', () => {
    const same = changed((document) => {
      document.lines.reverse();
      document.people[1].roles.reverse();
      document.plant[0].allowanceNoticePercent = 0.1 * 100 * (1 + Number.EPSILON);
    });
    expect(sentences(same)).toEqual([]);
    expect(summaries(same)).toEqual([
      '1 plant unchanged.',
      '2 shifts unchanged.',
      '2 lines unchanged.',
      '2 products unchanged.',
      '2 characteristics unchanged.',
      '2 specifications unchanged.',
      '2 gauges unchanged.',
      '3 channels unchanged.',
      '2 people unchanged.',
    ]);
  });

  it('is told row by row, from what to what', () => {
    const wanted = changed((document) => {
      document.plant[0].currency = null;
      document.lines.push({ name: 'Calender 2' });
      document.products[1] = { code: 'OF-25', name: 'Film 25', valuePerUnit: 0.5 };
      document.specifications[0] = { ...document.specifications[0], upper: null, validFrom: null };
      document.channels[0] = {
        ...document.channels[0],
        gauge: 'OF-P2',
        gaugeSince: Date.parse('2026-07-01T10:00:00Z'),
      };
      document.people[1].lines = [];
      document.people.push({ email: 'ada@overdale.example', name: 'Ada Kern', roles: ['technician'], lines: [] });
    });
    expect(sentences(wanted)).toEqual([
      'Plant changes: Currency from "CAD" to none.',
      'Line "Calender 2" is added.',
      'Product "OF-25" changes: Name from "Film 25 µm" to "Film 25", Value per unit from none to 0.5.',
      'Specification "OF-20", "Thickness" is proposed anew: Upper specification limit from 20.8 to none, Valid from from 2026-01-05 07:00 to the import on. It holds once a second person has approved it.',
      'Channel "Coater 1", "Thickness" changes: Gauge from "OF-L1" to "OF-P2", Gauge since from 1998-07-01 00:30 to 2026-07-01 06:00.',
      'Person "tom@overdale.example" changes: Lines from Coater 1, Slitter 4 to none.',
      'Person "ada@overdale.example" is invited.',
    ]);
  });

  it('is summed up a sheet a sentence, with what has no row', () => {
    const wanted = changed((document) => {
      document.lines = [{ name: 'Coater 1' }, { name: 'Calender 2' }, { name: 'Calender 3' }];
      document.products = [];
      document.gauges = document.gauges.slice(1);
      document.specifications[1] = { ...document.specifications[1], nominal: 8 };
    });
    const said = summaries(wanted);
    expect(said[2]).toBe('2 lines added, 1 unchanged; 1 has no row and stays as it is.');
    expect(said[3]).toBe('2 products have no row and stay as they are.');
    expect(said[5]).toBe('1 specification proposed anew, 1 unchanged.');
    expect(said[6]).toBe('1 gauge unchanged; 1 has no row and stays as it is.');
  });

  it('replaces a shift calendar whole', () => {
    const wanted = changed((document) => {
      document.shifts = [{ name: 'day', startsAt: '07:00', endsAt: '07:00', validFrom: '2026-02-02' }];
    });
    expect(sentences(wanted)).toEqual([
      'Shift "day" changes: Ends from "19:00" to "07:00", Valid from from "2026-01-05" to "2026-02-02".',
      'Shift "night" is not in the new calendar.',
    ]);
    expect(summaries(wanted)[1]).toBe('1 shift changed; 1 not in the new calendar.');
  });

  it('tells 0.1 from 0.100001', () => {
    const wanted = changed((document) => (document.characteristics[0].resolution = 0.100001));
    expect(sentences(wanted)).toEqual(['Characteristic "Thickness" changes: Resolution from 0.1 to 0.100001.']);
  });
});
