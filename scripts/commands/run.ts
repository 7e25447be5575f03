/** `hilum`: the engine and the readers at the command line. */
import { BadInput, type Command } from './command';

const COMMANDS: Record<string, { summary: string; load(): Promise<Command> }> = {
  acres: { summary: 'acres of every field in a boundary file', load: async () => (await import('./acres')).acresCommand },
  place: {
    summary: 'rank a line-up on every field, with ledgers and reasons',
    load: async () => (await import('./place')).placeCommand,
  },
  'season-line': {
    summary: 'stages of a variety at a place, and what a freeze would cost',
    load: async () => (await import('./season-line')).seasonLineCommand,
  },
  soil: { summary: 'soil tests from any laboratory, in one shape', load: async () => (await import('./soil')).soilCommand },
  solve: {
    summary: 'the best variety for every field within supply and wishes',
    load: async () => (await import('./solve')).solveCommand,
  },
  surface: {
    summary: 'a surface from points by kriging or inverse distance',
    load: async () => (await import('./surface')).surfaceCommand,
  },
  survey: {
    summary: 'map units of a soil survey area in every field',
    load: async () => (await import('./survey')).surveyCommand,
  },
};

export interface Result {
  exitCode: number;
  stdout: string;
  stderr: string;
}

function overview(): string {
  const width = Math.max(...Object.keys(COMMANDS).map((name) => name.length));
  const lines = Object.entries(COMMANDS).map(([name, { summary }]) => `  ${name.padEnd(width)}  ${summary}`);
  return `hilum COMMAND …   (JSON on stdout, problems on stderr, exit code 2 on bad input)\n\n${lines.join('\n')}\n\nhilum COMMAND --help tells more.\n`;
}

/** Runs a command line (without `node` and the script) and answers with what to print. */
export async function runHilum(argv: string[]): Promise<Result> {
  const [name, ...rest] = argv;
  if (name === undefined || name === '--help' || name === 'help') {
    return name === undefined ? { exitCode: 2, stdout: '', stderr: overview() } : { exitCode: 0, stdout: overview(), stderr: '' };
  }
  const entry = Object.hasOwn(COMMANDS, name) ? COMMANDS[name] : undefined;
  if (!entry) {
    return { exitCode: 2, stdout: '', stderr: `"${name}" is not a command. Known: ${Object.keys(COMMANDS).join(', ')}.\n` };
  }
  const command = await entry.load();
  if (rest.includes('--help')) return { exitCode: 0, stdout: `${command.usage}\n`, stderr: '' };
  try {
    const { value, notes = [], bad = false } = await command.run(rest);
    return {
      exitCode: bad ? 2 : 0,
      stdout: `${JSON.stringify(value, null, 2)}\n`,
      stderr: notes.map((line) => `${line}\n`).join(''),
    };
  } catch (error) {
    if (error instanceof BadInput) return { exitCode: 2, stdout: '', stderr: error.lines.map((line) => `${line}\n`).join('') };
    throw error;
  }
}
