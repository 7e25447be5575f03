import { runHilum } from './commands/run';

const { exitCode, stdout, stderr } = await runHilum(process.argv.slice(2));
process.stderr.write(stderr);
process.stdout.write(stdout);
// Set, not called: a pipe must drain before the process ends.
process.exitCode = exitCode;
