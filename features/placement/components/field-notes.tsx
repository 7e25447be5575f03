import { formatBushels } from '@/lib/format';
import { CAUTIONS } from '@/lib/ui/cautions';
import type { FixFirst, QuestionWorth, Stopped } from '../engine/model';

/** What costs the field bushels whatever is planted: remedy, worth, cost, caution. */
export function FixFirstBox({ fixes }: { fixes: FixFirst[] }) {
  if (fixes.length === 0) return null;
  return (
    <section aria-labelledby="fix-first" className="border-straw border-l-4 bg-straw-light px-4 py-3">
      <h2 id="fix-first" className="text-[1.1em]">
        Fix first — no variety buys these back
      </h2>
      <ul className="mt-1 flex flex-col gap-2">
        {fixes.map((fix) => (
          <li key={`${fix.factor} ${fix.title}`}>
            {fix.remedy}
            {fix.costDollarsPerAcre === null ? '' : ` Costs about $${fix.costDollarsPerAcre.toFixed(0)}/ac.`}{' '}
            <span className="block text-[0.88em] text-straw-deep">
              {fix.caution} Source: {fix.source}
            </span>
          </li>
        ))}
      </ul>
      <p className="mt-2 text-[0.88em] text-straw-deep">{CAUTIONS.soil}</p>
    </section>
  );
}

/** The questions whose answers would narrow the first pick's range most. */
export function Questions({ questions, factsHref }: { questions: QuestionWorth[]; factsHref: string }) {
  const helpful = questions.filter((one) => one.narrowsBushels >= 0.05).slice(0, 4);
  if (helpful.length === 0) return null;
  return (
    <section aria-labelledby="questions" className="border border-line bg-paper px-4 py-3">
      <h2 id="questions" className="text-[1.1em]">
        What would help most to know
      </h2>
      <ol className="mt-1 list-decimal pl-5">
        {helpful.map((one) => (
          <li key={`${one.fact} ${one.words}`}>
            {one.words} <span className="text-mute">Narrows the range by {formatBushels(one.narrowsBushels)} bu/ac.</span>
          </li>
        ))}
      </ol>
      <a href={factsHref} className="mt-2 inline-block font-semibold underline underline-offset-4">
        Answer in the facts
      </a>
    </section>
  );
}

/** Varieties that left the picks, with the reason; never hidden. */
export function StoppedList({ stopped }: { stopped: Stopped[] }) {
  if (stopped.length === 0) return null;
  return (
    <details className="border border-line bg-paper px-4 py-3">
      <summary className="cursor-pointer font-semibold">
        {stopped.length} {stopped.length === 1 ? 'variety is' : 'varieties are'} not placed here, and why
      </summary>
      <ul className="mt-2 flex flex-col gap-1">
        {stopped.map((one) => (
          <li key={one.varietyId}>
            <b>{one.code}</b> <span className="text-mute">{one.reason}</span>
          </li>
        ))}
      </ul>
    </details>
  );
}
