import type { CSSProperties } from 'react';
import { formatBand, formatBushels } from '@/lib/format';
import { Table, Td, Th } from '@/lib/ui/table';
import type { Assessment, FactorId, Pick, Ranking, VarietyProfile } from '../engine/model';
import { holdWords } from '../view';
import { FACTOR_COLOURS } from './factor-colours';

/** On a phone each line's name stands over its figures, so that four varieties fit side by side. */
const STACKED =
  'max-sm:[&_tr]:grid max-sm:[&_tr]:[grid-template-columns:repeat(var(--varieties),minmax(0,1fr))] max-sm:[&_tr]:border-line max-sm:[&_tr]:border-b max-sm:[&_tbody_th]:col-span-full max-sm:[&_tbody_th]:border-0! max-sm:[&_tbody_th]:pb-0 max-sm:[&_td]:border-0! max-sm:[&_thead_th:first-child]:hidden max-sm:[&_thead_th]:whitespace-normal max-sm:[&_thead_th]:px-2 max-sm:[&_td]:px-2';

/** Lines this much apart between the varieties are marked, bu/ac. */
const MARKED_FROM = 0.3;

interface Line {
  factor: FactorId;
  label: string;
}

function linesOf(assessments: Assessment[]): Line[] {
  const seen = new Map<FactorId, Line>();
  for (const assessment of assessments)
    for (const line of assessment.ledger) seen.set(line.factor, { factor: line.factor, label: line.label });
  return [...seen.values()];
}

const TRAITS: readonly { label: string; of: (variety: VarietyProfile) => string }[] = [
  { label: 'Relative maturity', of: (variety) => variety.relativeMaturity.toFixed(1) },
  { label: 'Height', of: (variety) => variety.height ?? '—' },
  { label: 'Bush type', of: (variety) => variety.bushType ?? '—' },
  { label: 'Standability', of: (variety) => ratingWords(variety.standability) },
  { label: 'Emergence', of: (variety) => ratingWords(variety.emergence) },
  {
    label: 'Phytophthora',
    of: (variety) =>
      `${ratingWords(variety.phytophthora)}${variety.phytophthoraGenes.length > 0 ? `, Rps ${variety.phytophthoraGenes.join(', ')}` : ', no gene'}`,
  },
  { label: 'Sudden death', of: (variety) => ratingWords(variety.suddenDeath) },
  { label: 'White mould', of: (variety) => ratingWords(variety.whiteMould) },
  { label: 'Iron chlorosis', of: (variety) => ratingWords(variety.ironChlorosis) },
  { label: 'Cyst nematode source', of: (variety) => variety.cystNematodeSource ?? '—' },
  { label: 'Herbicide tolerances', of: (variety) => variety.tolerances.join(', ') || 'conventional' },
];

function ratingWords(rating: number | null): string {
  return rating === null ? '—' : `${rating} of 9`;
}

/** Two to four varieties line by line; lines that tell them apart are marked, in words as well as in colour. */
export function CompareTable({ picks, ranking, varieties }: { picks: Pick[]; ranking: Ranking; varieties: VarietyProfile[] }) {
  const traits = picks.map((pick) => varieties.find((variety) => variety.id === pick.varietyId));
  const row = (label: string, values: number[], options: { factor?: FactorId | 'gathered'; strong?: boolean } = {}) => {
    const best = Math.max(...values);
    const apart = best - Math.min(...values) >= MARKED_FROM;
    return (
      <tr key={label} className={options.strong ? 'font-bold' : ''}>
        <th scope="row" className="border-line border-b px-3 py-2 text-left font-normal">
          <span className="flex items-center gap-2">
            {options.factor ? (
              <span aria-hidden="true" className="size-3 shrink-0" style={{ background: FACTOR_COLOURS[options.factor] }} />
            ) : null}
            <span className={options.strong ? 'font-bold' : ''}>{label}</span>
          </span>
        </th>
        {values.map((value, index) => {
          const mark =
            apart && options.factor ? (value === best ? 'best' : best - value >= MARKED_FROM ? 'costs more' : null) : null;
          return (
            <Td key={picks[index]?.varietyId} numeric className={mark === 'best' ? 'bg-leaf-light' : mark ? 'bg-rust-light' : ''}>
              {formatBushels(value)}
              {mark ? <span className="block text-[0.82em] text-mute">{mark}</span> : null}
            </Td>
          );
        })}
      </tr>
    );
  };
  return (
    <div style={{ '--varieties': picks.length } as CSSProperties}>
      <Table caption="Varieties compared, bushels per acre" className={STACKED}>
        <thead>
          <tr>
            <Th>bu/ac</Th>
            {picks.map((pick) => (
              <Th key={pick.varietyId} numeric className="text-ink">
                <span className="font-display text-lg">{pick.code}</span>
                <span className="block font-normal text-mute">{rankWords(ranking, pick)}</span>
              </Th>
            ))}
          </tr>
        </thead>
        <tbody>
          {row(
            'What this field can carry',
            picks.map((pick) => pick.potential),
          )}
          {linesOf(picks).map((line) =>
            row(
              line.label,
              picks.map((pick) => pick.ledger.find((one) => one.factor === line.factor)?.bushels ?? 0),
              { factor: line.factor },
            ),
          )}
          {row(
            'Small lines together',
            picks.map((pick) => pick.gatheredBushels),
            { factor: 'gathered' },
          )}
          {picks.some((pick) => pick.trialBushels !== 0)
            ? row(
                'Trials',
                picks.map((pick) => pick.trialBushels),
              )
            : null}
          {row(
            'Expected',
            picks.map((pick) => pick.expected),
            { strong: true },
          )}
          <tr>
            <th scope="row" className="border-line border-b px-3 py-2 text-left font-normal">
              Range, 10th to 90th percentile
            </th>
            {picks.map((pick) => (
              <Td key={pick.varietyId} numeric>
                {formatBand(pick.low, pick.high)}
              </Td>
            ))}
          </tr>
          <tr>
            <th scope="row" className="border-ink! border-b-2! px-3 py-2 text-left font-normal">
              Hold
            </th>
            {picks.map((pick) => (
              <Td key={pick.varietyId} numeric className="border-ink! border-b-2!">
                {holdWords(pick.hold)}
              </Td>
            ))}
          </tr>
          {TRAITS.map((trait) => (
            <tr key={trait.label}>
              <th scope="row" className="border-line border-b px-3 py-2 text-left font-normal text-mute">
                {trait.label}
              </th>
              {traits.map((variety, index) => (
                <Td key={picks[index]?.varietyId} numeric>
                  {variety ? trait.of(variety) : '—'}
                </Td>
              ))}
            </tr>
          ))}
        </tbody>
      </Table>
    </div>
  );
}

function rankWords(ranking: Ranking, pick: Pick): string {
  const place = ranking.picks.findIndex((one) => one.varietyId === pick.varietyId) + 1;
  return `pick ${place} of ${ranking.picks.length}`;
}
