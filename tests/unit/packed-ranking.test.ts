import { describe, expect, test } from 'vitest';
import { packRanking, unpackRanking } from '@/db/packed-ranking';
import { rank } from '@/features/placement/engine/rank';
import { aField, aLineUp, aSeason, someRules } from '../support/profiles';

describe('a stored ranking', () => {
  const ranking = rank(aField(), aLineUp(60), aSeason(), someRules());
  const packed = JSON.stringify(packRanking(ranking));
  const read = unpackRanking(JSON.parse(packed));

  test('reads back with every word and every figure to a ten-thousandth of a bushel', () => {
    expect(read.picks.map((pick) => pick.code)).toEqual(ranking.picks.map((pick) => pick.code));
    expect(read.stopped).toEqual(ranking.stopped);
    expect(read.fixFirst).toEqual(ranking.fixFirst);
    ranking.picks.forEach((pick, index) => {
      const other = read.picks[index];
      expect(other?.ledger.map((line) => [line.factor, line.label, line.reason, line.detail, line.source])).toEqual(
        pick.ledger.map((line) => [line.factor, line.label, line.reason, line.detail, line.source]),
      );
      for (const [at, line] of pick.ledger.entries()) expect(other?.ledger[at]?.bushels).toBeCloseTo(line.bushels, 4);
    });
  });

  test('has ledgers that sum to what is expected, within the rounding of their lines', () => {
    for (const pick of read.picks) {
      const sum =
        pick.potential + pick.ledger.reduce((total, line) => total + line.bushels, 0) + pick.gatheredBushels + pick.trialBushels;
      expect(Math.abs(sum - pick.expected)).toBeLessThan(0.002);
    }
  });

  test('takes less than half the room of the plain text', () => {
    expect(packed.length).toBeLessThan(JSON.stringify(ranking).length / 2);
    console.info(`packed ${packed.length} of ${JSON.stringify(ranking).length} characters`);
  });
});
