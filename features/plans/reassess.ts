import 'server-only';
import type { fieldFacts } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { assess } from '@/features/placement/engine/assess';
import type { Assessment } from '@/features/placement/engine/model';
import { engineInputs, gatherFieldInputs } from '@/features/placement/inputs';
import { NotFoundError } from '@/lib/errors';

type Facts = Pick<typeof fieldFacts.$inferSelect, 'rowWidthInches' | 'populationSeedsPerAcre'>;
type RowRate = { rowWidthInches: number | null; populationSeedsPerAcre: number | null };

/** Is the row planted otherwise than the field's facts say, so that its stored score does not hold for it? */
export function deviates(row: RowRate, facts: Facts | null): boolean {
  const differs = (mine: number | null, stated: number | null | undefined) =>
    mine !== null && stated !== null && stated !== undefined && mine !== stated;
  return differs(row.rowWidthInches, facts?.rowWidthInches) || differs(row.populationSeedsPerAcre, facts?.populationSeedsPerAcre);
}

/** The engine's answer for a variety on the field at this row width and rate; `null` when the variety is not in its line-up. */
export type AssessAt = (varietyId: string, row: RowRate) => Assessment | null;

/** Gathers what the engine needs of one field, outside of any transaction; `null` when the field is not the viewer's to see. */
export async function assessorOf(viewer: Viewer, fieldId: string, season: number): Promise<AssessAt | null> {
  try {
    const { shared, inputs } = await gatherFieldInputs(viewer, fieldId, season);
    return (varietyId, row) => {
      const variety = shared.varieties.find((one) => one.id === varietyId);
      if (!variety) return null;
      const { profile, season: context, rules } = engineInputs(inputs, shared);
      return assess({ ...profile, ...row }, variety, context, rules);
    };
  } catch (error) {
    if (error instanceof NotFoundError) return null;
    throw error;
  }
}
