import { type Answerer, summaryQuestions } from './summary-questions';
import { gauge, madeSummary, openHold } from './testing/made-summary';

const PEOPLE: Answerer[] = [
  { name: 'Adaeze Thornbury', role: 'quality_manager', lineIds: [1] },
  { name: 'Sunniva Marsh', role: 'technician', lineIds: [] },
  { name: 'Colin Prewett', role: 'line_lead', lineIds: [1] },
  { name: 'Somebody Else', role: 'line_lead', lineIds: [2] },
];
const asked = (differs: Parameters<typeof madeSummary>[0], people = PEOPLE) =>
  summaryQuestions(madeSummary(differs), people).map(({ whom, question, path }) => [
    whom,
    question.replaceAll('\u202f', ' '),
    path,
  ]);

describe('whom to ask what', () => {
  it('is nobody anything in a quiet week', () => {
    expect(asked({})).toEqual([]);
  });

  it('is the quality manager about holds past the managers’ hours, by their name', () => {
    const holds = [openHold(), openHold({ ageHours: 5 }), openHold({ ageHours: 90, decidedSince: 'scrap' })];
    expect(asked({ openHolds: { count: 3, holds } })).toEqual([
      [
        'the quality manager, Adaeze Thornbury',
        'What keeps lot 24118 of Coater 2 from being decided? It had waited 2 d 4 h at the week’s end.',
        '/holds/7',
      ],
    ]);
  });

  it('is one question a person, however many lots wait for them', () => {
    const other = openHold({
      holdId: 8,
      lot: { id: 71, number: '73101' },
      line: { id: 3, name: 'Slurry 3' },
      ageHours: 30,
    });
    const holds = [openHold(), other, openHold({ ageHours: 20 }), openHold({ ageHours: 9 })];
    expect(asked({ openHolds: { count: 4, holds } })).toEqual([
      [
        'the quality manager, Adaeze Thornbury',
        'What keeps 4 lots from being decided: 24118 of Coater 2 (2 d 4 h), 73101 of Slurry 3 (1 d 6 h), 24118 of Coater 2 (20 h) and 1 more?',
        '/holds/7',
      ],
    ]);
  });

  it('is the lead of the line about lots that nobody confirmed to stand aside', () => {
    const holds = [openHold({ isSetAside: false, ageHours: 5 }), openHold({ isSetAside: false, ageHours: 4 })];
    expect(asked({ openHolds: { count: 2, holds } })).toEqual([
      [
        'the line lead, Colin Prewett',
        'Does lot 24118 and 1 lot more of Coater 2 stand aside? Nobody has confirmed it.',
        '/holds/7',
      ],
    ]);
  });

  it('is the technician about gauges beyond, near or fast towards their allowance', () => {
    const at = (share: number, lastWeekShare: number | null, isGettingWorse = false) =>
      asked({ gauges: [gauge({ share, lastWeekShare, isGettingWorse })] }).map(([, question]) => question);
    expect(at(1.12, 0.97)).toEqual([
      'When will gauge BG-204 be checked? The slow movement of Coat weight on Coater 2 has used 112 % of its allowance, 97 % the week before, and its lots are not scored.',
    ]);
    expect(at(0.8, null)).toEqual([
      'Can gauge BG-204 be checked before it holds up lots? The slow movement of Coat weight on Coater 2 has used 80 % of its allowance.',
    ]);
    expect(at(0.55, 0.3, true)).toHaveLength(1);
    expect(at(0.55, 0.5)).toEqual([]);
    expect(at(0.4, 0.25, true)).toEqual([]);
    expect(at(0.4, 0.1, true)).toEqual([
      'Can gauge BG-204 be checked before it holds up lots? The slow movement of Coat weight on Coater 2 has used 40 % of its allowance, 10 % the week before; at that pace it is used up within 2 weeks.',
    ]);
  });

  it('is a role alone where nobody has it', () => {
    expect(asked({ openHolds: { count: 1, holds: [openHold()] } }, [])[0][0]).toBe('the quality manager');
  });

  it('is the engineer about what is missing for a score, and who uploaded a workbook about it', () => {
    const line = { id: 1, name: 'Coater 2' };
    const entry = { line, channel: { id: 11, name: 'Coat weight' }, lots: 4, lastWeekLots: 0 };
    const intake = {
      id: 5,
      line,
      fileName: 'late.xlsx',
      receivedAt: '2026-03-05T00:00:00.000Z',
      receivedBy: 'Maren Holloway',
    };
    expect(
      asked({
        notScored: [
          { ...entry, reason: 'beyond_allowance', sentence: 'beyond' },
          { ...entry, reason: 'no_plan_in_force', sentence: 'no plan is in force for this channel' },
        ],
        intakes: {
          count: 2,
          intakes: [
            { ...intake, state: 'needs_attention', sentence: 'It waits.' },
            { ...intake, state: 'refused', sentence: 'It was refused.' },
          ],
        },
      }),
    ).toEqual([
      [
        'the quality engineer',
        'What is missing for 4 lots of Coater 2 to be scored on Coat weight? So far no plan is in force for this channel.',
        '/channels/11',
      ],
      ['Maren Holloway', 'What became of late.xlsx for Coater 2? It waits.', '/intakes/5'],
    ]);
  });
});
