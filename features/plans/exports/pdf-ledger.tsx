import { Text, View } from '@react-pdf/renderer';
import { FACTOR_COLOURS } from '@/features/placement/components/factor-colours';
import type { Assessment } from '@/features/placement/engine/model';
import { formatBushels } from '@/lib/format';

/** How many lines a short ledger names; the rest stand together. */
const NAMED_LINES = 4;

/** The ledger in short: what the field can carry, the dearest lines with their reasons, the rest together, what is expected. */
export function PdfLedger({ assessment }: { assessment: Assessment }) {
  const ordered = [...assessment.ledger].sort((a, b) => a.bushels - b.bushels);
  const named = ordered.slice(0, NAMED_LINES);
  const rest =
    ordered.slice(NAMED_LINES).reduce((total, line) => total + line.bushels, 0) +
    assessment.gatheredBushels +
    assessment.trialBushels;
  return (
    <View style={{ marginTop: 3, fontSize: 8 }}>
      <Line bushels={formatBushels(assessment.potential)} words="the field can carry" />
      {named.map((line) => (
        <Line
          key={line.factor}
          bushels={formatBushels(line.bushels)}
          words={`${line.label}: ${line.reason}`}
          colour={FACTOR_COLOURS[line.factor]}
        />
      ))}
      {Math.abs(rest) >= 0.05 ? (
        <Line bushels={formatBushels(rest)} words="all the rest together" colour={FACTOR_COLOURS.gathered} />
      ) : null}
    </View>
  );
}

function Line({ bushels, words, colour }: { bushels: string; words: string; colour?: string }) {
  return (
    <View style={{ flexDirection: 'row', alignItems: 'flex-start', marginBottom: 1 }}>
      <View style={{ width: 6, height: 6, marginTop: 2, marginRight: 4, backgroundColor: colour ?? '#d9cfb9' }} />
      <Text style={{ width: 30, textAlign: 'right', marginRight: 6, fontWeight: 600 }}>{bushels}</Text>
      <Text style={{ flex: 1 }}>{words}</Text>
    </View>
  );
}
