import type { Assessment } from '../engine/model';
import { FACTOR_COLOURS } from './factor-colours';

/** Yield kept in green, then each loss in its factor's colour, up to what the field can carry. The numbers stand beside it. */
export function KeptBar({ assessment, scaleTo }: { assessment: Assessment; scaleTo: number }) {
  const width = (bushels: number) => `${(Math.max(0, bushels) / scaleTo) * 100}%`;
  const losses = assessment.ledger.filter((line) => line.bushels < 0).sort((one, other) => one.bushels - other.bushels);
  return (
    <div aria-hidden="true" className="flex h-4 w-full">
      <span className="bg-leaf" style={{ width: width(assessment.expected) }} />
      {losses.map((line) => (
        <span key={line.factor} style={{ width: width(-line.bushels), background: FACTOR_COLOURS[line.factor] }} />
      ))}
      {assessment.gatheredBushels < 0 ? (
        <span style={{ width: width(-assessment.gatheredBushels), background: FACTOR_COLOURS.gathered }} />
      ) : null}
    </div>
  );
}
