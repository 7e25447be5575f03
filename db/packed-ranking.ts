import type { FactorId, LedgerLine, Pick, Ranking } from '@/features/placement/engine/model';

/**
 * A ranking as it is stored: the same words (sources, labels, reasons that every variety shares) once, figures to a ten-thousandth of
 * a bushel. About a sixth of the plain text, and read back to the same ranking but for that rounding.
 */
export interface PackedRanking extends Omit<Ranking, 'picks'> {
  words: string[];
  picks: (Omit<Pick, 'ledger' | 'advice'> & { ledger: PackedLine[]; advice: number[] })[];
}

type PackedLine = [
  factor: FactorId,
  bushels: number,
  fieldBushels: number,
  matchBushels: number,
  label: number,
  reason: number,
  detail: number,
  source: number,
];

const tenThousandth = (value: number) => Math.round(value * 10_000) / 10_000;

/** The stored form of a ranking. */
export function packRanking(ranking: Ranking): PackedRanking {
  const words: string[] = [];
  const places = new Map<string, number>();
  const place = (text: string): number => {
    let at = places.get(text);
    if (at === undefined) {
      at = words.length;
      words.push(text);
      places.set(text, at);
    }
    return at;
  };
  const picks = ranking.picks.map((pick) => ({
    ...pick,
    gatheredBushels: tenThousandth(pick.gatheredBushels),
    trialBushels: tenThousandth(pick.trialBushels),
    expected: tenThousandth(pick.expected),
    low: tenThousandth(pick.low),
    high: tenThousandth(pick.high),
    fieldLogDeviation: Number(pick.fieldLogDeviation.toPrecision(6)),
    varietyLogDeviation: Number(pick.varietyLogDeviation.toPrecision(6)),
    advice: pick.advice.map(place),
    ledger: pick.ledger.map(
      (line): PackedLine => [
        line.factor,
        tenThousandth(line.bushels),
        tenThousandth(line.fieldBushels),
        tenThousandth(line.matchBushels),
        place(line.label),
        place(line.reason),
        place(line.detail),
        place(line.source),
      ],
    ),
  }));
  return { ...ranking, words, picks };
}

/** The ranking a stored form holds. */
export function unpackRanking({ words, picks, ...rest }: PackedRanking): Ranking {
  const word = (at: number) => words[at] as string;
  return {
    ...rest,
    picks: picks.map((pick) => ({
      ...pick,
      advice: pick.advice.map(word),
      ledger: pick.ledger.map(
        ([factor, bushels, fieldBushels, matchBushels, label, reason, detail, source]): LedgerLine => ({
          factor,
          label: word(label),
          bushels,
          fieldBushels,
          matchBushels,
          reason: word(reason),
          detail: word(detail),
          source: word(source),
        }),
      ),
    })),
  };
}
