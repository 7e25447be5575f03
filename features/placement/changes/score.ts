import 'server-only';
import { setImmediate } from 'node:timers/promises';
import { fieldScores } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import { requireOperation } from '@/features/accounts/scope';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { rank } from '../engine/rank';
import { ENGINE_VERSION } from '../engine/version';
import { engineInputs, gatherInputs, hashOfInputs, hashOfShared, supplyForRanking } from '../inputs';
import { scoreSchema } from '../schemas';

/**
 * Scores every field of an operation against the published line-up. The computing is done before the transaction, field by
 * field with a breath between so that other requests go on; then all rankings are stored in one short write.
 */
export async function scoreOperation(
  viewer: Viewer,
  input: unknown,
): Promise<Outcome<{ fieldCount: number; pickCount: number }>> {
  const parsed = scoreSchema.safeParse(input);
  if (!parsed.success || !may(viewer, 'score', 'renew')) return bad('This cannot be scored.');
  const { operationId, season } = parsed.data;
  try {
    await requireOperation(viewer, operationId);
  } catch (error) {
    if (error instanceof NotFoundError) return bad(error.message);
    throw error;
  }
  const { shared, fields } = await gatherInputs(viewer, operationId, season);
  if (fields.length === 0) return bad('There are no fields to score yet. Bring in boundaries first.');
  if (shared.varieties.length === 0)
    return bad(`There is no published variety in the ${season} line-up yet, so there is nothing to place.`);
  const sharedHash = hashOfShared(shared);
  const varieties = shared.varieties.map(supplyForRanking);
  const scores: (typeof fieldScores.$inferInsert)[] = [];
  for (const inputs of fields) {
    const { profile, season: context, rules } = engineInputs(inputs, shared);
    scores.push({
      fieldId: inputs.field.id,
      season,
      engineVersion: ENGINE_VERSION,
      inputsHash: hashOfInputs(inputs, sharedHash),
      ranking: rank(profile, varieties, context, rules),
      scoredAt: Date.now(),
      scoredByPersonId: viewer.personId,
    });
    await setImmediate();
  }
  return change(viewer, {
    right: ['score', 'renew'],
    schema: scoreSchema,
    input,
    run: async (transaction) => {
      await requireOperation(viewer, operationId, transaction);
      for (const score of scores) {
        const { fieldId: _field, season: _season, ...values } = score;
        await transaction
          .insert(fieldScores)
          .values(score)
          .onConflictDoUpdate({ target: [fieldScores.fieldId, fieldScores.season], set: values });
      }
      return {
        ...good({ fieldCount: scores.length, pickCount: varieties.length }),
        audit: {
          verb: 'score.renewed',
          thing: 'operation',
          thingId: operationId,
          operationId,
          summary: `Scored ${scores.length} fields against ${varieties.length} varieties for ${season}.`,
        },
      };
    },
  });
}
