import { formatBushels } from '@/lib/format';
import { Panel } from '@/lib/ui/page';
import { whatWouldMakeItFirst, whyNot } from '../engine/explain';
import type { Pick, Ranking, VarietyProfile } from '../engine/model';
import type { EngineInputs } from '../inputs';
import { FACTOR_COLOURS } from './factor-colours';

/** Why a pick is not the first one, and what would have to change for it to be first: both worked out by the engine. */
export function WhyNotPanel({
  pick,
  ranking,
  engine,
  varieties,
}: {
  pick: Pick;
  ranking: Ranking;
  engine: EngineInputs;
  varieties: VarietyProfile[];
}) {
  const first = ranking.picks[0] as Pick;
  const why = whyNot(first, pick);
  const change = whatWouldMakeItFirst(engine.profile, varieties, engine.season, engine.rules, pick.varietyId);
  return (
    <Panel>
      <h2 className="text-lg">Why not {pick.code}?</h2>
      <p className="mt-1">{why.sentence}</p>
      <ul className="mt-2">
        {why.lines.slice(0, 5).map((line) => (
          <li key={line.factor} className="flex items-center gap-2 border-line border-t py-1">
            <span aria-hidden="true" className="size-3 shrink-0" style={{ background: FACTOR_COLOURS[line.factor] }} />
            <span className="grow">{line.label}</span>
            <span className="tabular-nums">
              {line.bushels > 0 ? '+' : ''}
              {formatBushels(line.bushels)}
            </span>
          </li>
        ))}
      </ul>
      <p className="mt-1 text-[0.9em] text-mute">
        Plus: {first.code} loses less there. Minus: {pick.code} does.
      </p>
      <h3 className="mt-3">What would have to change for {pick.code} to be first?</h3>
      <p className="mt-1">{change.sentence}</p>
      {change.ways.length > 1 ? (
        <ul className="mt-1 list-disc pl-5">
          {change.ways.slice(0, 4).map((way) => (
            <li key={way.words}>
              {way.words}: {formatBushels(way.expected)} bu/ac, ahead by {formatBushels(way.leadBushels)}
            </li>
          ))}
        </ul>
      ) : null}
    </Panel>
  );
}
