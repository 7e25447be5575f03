import { problemSchema, problemsOf } from '@/features/plans/solver/problem';
import { solvePlan } from '@/features/plans/solver/solve';
import { type Command, optionalNumber, parseOptions, readText, refuse } from './command';

/** `hilum solve PROBLEM.json`: the best plan within supply and wishes. */
export const solveCommand: Command = {
  summary: 'the best variety for every field within supply and wishes',
  usage: [
    'hilum solve PROBLEM.json [--seconds N]',
    '',
    'PROBLEM.json holds fields [{id, acres, unitsPerAcre}], varieties [{id, units}], value [{field, variety, perAcre}] (dollars),',
    'and as wanted stops [{field, variety}], maxShare, minAcresPerVariety, maxVarieties, splitMinFraction (1: no field is split;',
    '0.25: a part is at least a quarter; a field is split at most once), locks [{field, variety}],',
    'groups [{name, varieties, maxAcres}]. A pair without a value is not open; a field may stay empty.',
    'Answers {status, objective, gap, seconds, rows, binding, shadow, relaxation}.',
  ].join('\n'),
  async run(argv) {
    const parsed = parseOptions(argv, { seconds: { type: 'string' } });
    const [path, ...more] = parsed.positionals;
    if (path === undefined || more.length > 0) return refuse('Name one problem file: hilum solve PROBLEM.json');
    const seconds = optionalNumber(parsed, 'seconds', 1, 600) ?? undefined;
    let given: unknown;
    try {
      given = JSON.parse(await readText(path));
    } catch (error) {
      if (error instanceof SyntaxError) return refuse(`${path} is not JSON: ${error.message}.`);
      throw error;
    }
    const result = problemSchema.safeParse(given);
    if (!result.success) {
      return refuse(...result.error.issues.slice(0, 20).map((issue) => `${issue.path.join('.') || 'problem'}: ${issue.message}`));
    }
    const wrong = problemsOf(result.data);
    if (wrong.length > 0) return refuse(...wrong);
    return { value: await solvePlan(result.data, seconds === undefined ? {} : { seconds }) };
  },
};
