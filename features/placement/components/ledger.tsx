import { formatBushels } from '@/lib/format';
import type { Assessment } from '../engine/model';
import { FACTOR_COLOURS } from './factor-colours';

/** The explanation of one pick, in bushels per acre: what the field can carry, each loss, what is expected. */
export function Ledger({ assessment }: { assessment: Assessment }) {
  const { code, potential, ledger, gatheredBushels, trialBushels, expected } = assessment;
  return (
    <>
      <table className="w-full border border-ink/60 bg-white text-left">
        <caption className="sr-only">Ledger of {code}, bushels per acre</caption>
        <tbody>
          <tr>
            <th scope="row" colSpan={2} className="px-3 py-2 pl-9 font-semibold">
              What this field can carry
              <span className="block font-normal text-[0.9em] text-mute">{POTENTIAL_WORDS[assessment.potentialSource]}</span>
            </th>
            <td className="px-3 py-2 text-right align-top font-semibold">{formatBushels(potential)}</td>
          </tr>
          {ledger.map((line) => (
            <tr key={line.factor} className="border-line border-t">
              <td className="w-9 py-2 pl-3 align-top">
                <span aria-hidden="true" className="mt-1 block size-3" style={{ background: FACTOR_COLOURS[line.factor] }} />
              </td>
              <th scope="row" className="py-2 pr-2 font-normal">
                <span className="font-semibold">{line.label}:</span> {line.reason}
                <span className="block text-[0.9em] text-mute">
                  {line.detail ? `${line.detail}. ` : ''}
                  {partWords(line.fieldBushels, line.matchBushels)}
                </span>
              </th>
              <td className="px-3 py-2 text-right align-top whitespace-nowrap">{formatBushels(line.bushels)}</td>
            </tr>
          ))}
          {gatheredBushels !== 0 ? (
            <PlainRow factor="gathered" label="Small lines together, each under 0.1 bu" bushels={gatheredBushels} />
          ) : null}
          {trialBushels !== 0 ? (
            <PlainRow factor="trial" label="Trials: what this variety has shown beyond its ratings" bushels={trialBushels} />
          ) : null}
          <tr className="border-ink border-t-2 font-semibold">
            <th scope="row" colSpan={2} className="px-3 py-2 pl-9">
              Expected
            </th>
            <td className="px-3 py-2 text-right">{formatBushels(expected)}</td>
          </tr>
        </tbody>
      </table>
      <details className="border border-ink/60 border-t-0 bg-white px-3 py-2 text-[0.92em]">
        <summary className="cursor-pointer text-mute">Where each line comes from</summary>
        <dl className="mt-1 flex flex-col gap-1">
          {ledger.map((line) => (
            <div key={line.factor}>
              <dt className="inline font-semibold">{line.label}: </dt>
              <dd className="inline text-mute">{line.source}</dd>
            </div>
          ))}
        </dl>
      </details>
    </>
  );
}

const POTENTIAL_WORDS: Record<Assessment['potentialSource'], string> = {
  goal: 'the grower’s goal',
  history: 'from this field’s own yields',
  default: 'a usual figure for the state; a yield goal would narrow the range',
};

/** How much of a loss every variety would suffer here, and how much is this one's own. */
function partWords(fieldBushels: number, matchBushels: number): string {
  if (Math.abs(matchBushels) < 0.05) return 'Every variety has this here.';
  if (Math.abs(fieldBushels) < 0.05) return 'This variety’s own.';
  return `${formatBushels(fieldBushels)} any variety would have here, ${formatBushels(matchBushels)} this one’s own.`;
}

function PlainRow({ factor, label, bushels }: { factor: 'gathered' | 'trial'; label: string; bushels: number }) {
  return (
    <tr className="border-line border-t">
      <td className="w-9 py-2 pl-3 align-top">
        <span aria-hidden="true" className="mt-1 block size-3" style={{ background: FACTOR_COLOURS[factor] }} />
      </td>
      <th scope="row" className="py-2 pr-2 font-normal">
        {label}
      </th>
      <td className="px-3 py-2 text-right align-top whitespace-nowrap">{formatBushels(bushels)}</td>
    </tr>
  );
}
