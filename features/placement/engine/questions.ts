/** Which answer would help most: the drop in the width of the first pick's band if a fact were known. */
import type { Evaluation } from './evaluate';
import type { QuestionWorth } from './model';
import { NINETIETH } from './numbers';

/** Questions that would narrow the band by less than this are not worth asking, bu/ac. */
const WORTH_ASKING = 0.005;

function bandWidth(expected: number, logDeviation: number): number {
  return expected * (Math.exp(NINETIETH * logDeviation) - Math.exp(-NINETIETH * logDeviation));
}

/**
 * The first pick's open questions, most helpful first. Each fact's deviations over all factors that ask for it are taken as
 * independent. A question that can stop a variety (the weed programme) stays, though it narrows nothing.
 */
export function questionsOf(first: Evaluation): QuestionWorth[] {
  const { expected, fieldLogDeviation, varietyLogDeviation, code } = first.assessment;
  const variance = fieldLogDeviation ** 2 + varietyLogDeviation ** 2;
  const now = bandWidth(expected, Math.sqrt(variance));
  const byFact = new Map<QuestionWorth['fact'], { words: string; variance: number }>();
  for (const { fact, words, logDeviation } of first.asks) {
    const known = byFact.get(fact);
    if (known) known.variance += logDeviation ** 2;
    else byFact.set(fact, { words, variance: logDeviation ** 2 });
  }
  return [...byFact]
    .map(([fact, one]) => ({
      fact,
      words: one.words.replace('this variety', code),
      narrowsBushels: now - bandWidth(expected, Math.sqrt(Math.max(0, variance - one.variance))),
    }))
    .filter((one) => one.narrowsBushels >= WORTH_ASKING || one.fact === 'weedProgramme')
    .sort((a, b) => b.narrowsBushels - a.narrowsBushels || (a.fact < b.fact ? -1 : 1));
}
