interface Stage {
  name: string;
}
const { readOptions, chosenStages, inLanes } = jest.requireActual<{
  readOptions: (args: string[]) => { only: string[]; isVerbose: boolean; isHelp: boolean; minutes: number };
  chosenStages: (only: string[]) => Stage[];
  inLanes: (stages: Stage[]) => { beside: Stage[][]; alone: Stage[] };
}>('./stages.mjs');

const names = (stages: Stage[]) => stages.map((stage) => stage.name);
const ALL = ['lint', 'types', 'format', 'build', 'unit', 'data', 'api', 'reliability', 'browser'];

describe('the options of npm test', () => {
  it('choose everything and 15 minutes when none is given', () => {
    expect(readOptions([])).toEqual({ only: ALL, isVerbose: false, isHelp: false, minutes: 45 });
  });

  it('can be written with a space or an equals sign', () => {
    expect(readOptions(['--only', 'unit,api']).only).toEqual(['unit', 'api']);
    expect(readOptions(['--only=unit,api', '--minutes=30', '--verbose'])).toMatchObject({
      only: ['unit', 'api'],
      minutes: 30,
      isVerbose: true,
    });
  });

  it.each([[['--only', 'uint']], [['--only']], [['--only=']], [['--minutes', 'x']], [['--fast']]])(
    'refuse %j',
    (args) => {
      expect(() => readOptions(args)).toThrow('--help');
    },
  );
});

describe('the stages', () => {
  it('include the build when something runs what it builds', () => {
    expect(names(chosenStages(['unit', 'api']))).toEqual(['build', 'unit', 'api']);
    expect(names(chosenStages(['unit']))).toEqual(['unit']);
  });

  it('all stand in one lane, each once', () => {
    const { beside, alone } = inLanes(chosenStages(ALL));
    expect(names([...beside.flat(), ...alone]).sort()).toEqual([...ALL].sort());
  });
});
