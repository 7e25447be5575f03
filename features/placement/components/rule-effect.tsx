import { formatBushels } from '@/lib/format';
import { Table, Td, Th } from '@/lib/ui/table';
import type { Ranking } from '../engine/model';

const SHOWN = 8;

/** What the values being typed do to one field: place and expected yield of the first picks, before and after. */
export function RuleEffect({
  field,
  before,
  usual,
  after,
  changed,
}: {
  field: { name: string };
  before: Ranking;
  usual: Ranking;
  after: Ranking;
  changed: boolean;
}) {
  const was = new Map(before.picks.map((pick, index) => [pick.varietyId, { place: index + 1, expected: pick.expected }]));
  const asUsual = new Map(usual.picks.map((pick) => [pick.varietyId, pick.expected]));
  const first = after.picks[0];
  const firstBefore = before.picks[0];
  return (
    <section aria-labelledby="effect">
      <h2 id="effect" className="mb-1 text-lg">
        On {field.name}
      </h2>
      <p className="mb-2" role="status">
        {!first
          ? 'No variety fits this field.'
          : !changed
            ? `${first.code} is first, at ${formatBushels(first.expected)} bu/ac.`
            : first.varietyId === firstBefore?.varietyId
              ? `${first.code} stays first, at ${formatBushels(first.expected)} bu/ac.`
              : `${first.code} comes first instead of ${firstBefore?.code ?? 'none'}.`}
      </p>
      <Table caption={`Picks on ${field.name} with these values`}>
        <thead>
          <tr>
            <Th>Pick</Th>
            <Th numeric>Stands</Th>
            <Th numeric>Tried</Th>
            <Th numeric>As usual</Th>
          </tr>
        </thead>
        <tbody>
          {after.picks.slice(0, SHOWN).map((pick, index) => {
            const old = was.get(pick.varietyId);
            const difference = old ? pick.expected - old.expected : 0;
            const moved = old && old.place !== index + 1;
            return (
              <tr key={pick.varietyId}>
                <Td>
                  {index + 1}. <b>{pick.code}</b>
                  {moved ? <span className="text-mute"> was {old.place}</span> : null}
                </Td>
                <Td numeric>{formatBushels(old?.expected)}</Td>
                <Td numeric>
                  <b>{formatBushels(pick.expected)}</b>
                  {Math.abs(difference) >= 0.05 ? (
                    <span className={`block text-[0.88em] ${difference > 0 ? 'text-leaf' : 'text-rust-deep'}`}>
                      {difference > 0 ? '+' : ''}
                      {formatBushels(difference)}
                    </span>
                  ) : null}
                </Td>
                <Td numeric className="text-mute">
                  {formatBushels(asUsual.get(pick.varietyId))}
                </Td>
              </tr>
            );
          })}
        </tbody>
      </Table>
      <p className="mt-1 text-[0.9em] text-mute">
        bu/ac. Worked out here as you type, by the same engine that scores the fields.
      </p>
    </section>
  );
}
