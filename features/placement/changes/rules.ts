import 'server-only';
import { and, eq } from 'drizzle-orm';
import { coefficientOverrides } from '@/db/schema';
import { type AuditNote, change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { bad, good, type Outcome } from '@/lib/errors';
import { coefficientNamed, coefficientProblem } from '../engine/coefficients';
import { coefficientWords } from '../rules';
import { setRulesSchema } from '../schemas';

/**
 * Sets planning coefficients of the dealership, each within its range; `null` sets one back to its usual value. One audit row
 * for each that really changed, with who, from and to. All of them or none. Managers only.
 */
export async function setRules(viewer: Viewer, input: unknown): Promise<Outcome<{ changedCount: number }>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: setRulesSchema,
    input,
    run: async (transaction, { values }) => {
      const problems = Object.entries(values).flatMap(([name, value]) => {
        const entry = coefficientNamed(name);
        const wrong = !entry?.changeable
          ? `${name} is not a coefficient that can be changed.`
          : value === null
            ? null
            : coefficientProblem(name, value);
        return wrong ? [{ message: wrong, path: name }] : [];
      });
      if (problems.length > 0) return bad(problems);
      const rows = await transaction
        .select()
        .from(coefficientOverrides)
        .where(eq(coefficientOverrides.dealershipId, viewer.dealershipId));
      const before = new Map(rows.map((row) => [row.name, row.value]));
      const audit: AuditNote[] = [];
      for (const [name, asked] of Object.entries(values)) {
        const entry = coefficientNamed(name);
        if (!entry) continue;
        const value = asked === entry.value ? null : asked;
        const was = before.get(name) ?? entry.value;
        if (was === (value ?? entry.value)) continue;
        const key = and(eq(coefficientOverrides.dealershipId, viewer.dealershipId), eq(coefficientOverrides.name, name));
        if (value === null) await transaction.delete(coefficientOverrides).where(key);
        else {
          const set = { value, changedByPersonId: viewer.personId, changedAt: Date.now() };
          await transaction
            .insert(coefficientOverrides)
            .values({ dealershipId: viewer.dealershipId, name, ...set })
            .onConflictDoUpdate({ target: [coefficientOverrides.dealershipId, coefficientOverrides.name], set });
        }
        const to = value ?? entry.value;
        audit.push({
          verb: value === null ? 'coefficient.reset' : 'coefficient.set',
          thing: 'coefficient',
          thingId: name,
          summary: `Set ${coefficientWords(name)} from ${was} to ${to} ${entry.unit}${value === null ? ', its usual value' : ''}.`,
          detail: { name, from: was, to },
        });
      }
      if (audit.length === 0) return bad('Nothing was changed: every value stands already as it was set.');
      return { ...good({ changedCount: audit.length }), audit };
    },
  });
}
