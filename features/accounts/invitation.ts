import 'server-only';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { dealerships, invitations, operationPeople, people } from '@/db/schema';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId, sha256 } from '@/lib/ids';
import { recordAudit } from './gate';
import { passwordProblem } from './password-rules';
import { hashPassword } from './passwords';
import { acceptInvitationSchema } from './schemas';
import type { SessionCookie } from './sessions';
import { letIn } from './sign-in';

export interface OpenInvitation {
  email: string;
  name: string;
  role: 'grower' | 'rep' | 'manager';
  dealershipName: string;
}

/** What an invitation link offers, while it is open; `null` when it was used, withdrawn or is too old. */
export async function openInvitation(token: string): Promise<OpenInvitation | null> {
  const rows = await database()
    .select({ email: invitations.email, name: invitations.name, role: invitations.role, dealershipName: dealerships.name })
    .from(invitations)
    .innerJoin(dealerships, eq(dealerships.id, invitations.dealershipId))
    .where(stillOpen(token));
  return rows[0] ?? null;
}

function stillOpen(token: string) {
  return and(
    eq(invitations.tokenHash, sha256(token)),
    isNull(invitations.acceptedAt),
    isNull(invitations.withdrawnAt),
    gt(invitations.expiresAt, Date.now()),
  );
}

/** Opens the account an invitation offers and signs its owner in. */
export async function acceptInvitation(
  input: unknown,
  browserToken: string | null,
): Promise<Outcome<{ cookies: SessionCookie[] }>> {
  const parsed = acceptInvitationSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  const passwordHash = await hashPassword(parsed.data.password);
  const outcome = await database().transaction(
    async (transaction): Promise<Outcome<{ personId: string }>> => {
      const [invitation] = await transaction.select().from(invitations).where(stillOpen(parsed.data.token));
      if (!invitation) return bad('This invitation was used already, was withdrawn or is too old. Ask for a new one.');
      const problem = passwordProblem(parsed.data.password, invitation.email);
      if (problem) return bad(problem, 'password');
      const taken = await transaction.select({ id: people.id }).from(people).where(eq(people.email, invitation.email));
      if (taken.length > 0)
        return bad(
          'There is an account for this e-mail already, and one e-mail serves one dealership. Sign in with it, or ask for an invitation to another address.',
        );
      await transaction.update(invitations).set({ acceptedAt: Date.now() }).where(eq(invitations.id, invitation.id));
      const personId = createId();
      await transaction.insert(people).values({
        id: personId,
        dealershipId: invitation.dealershipId,
        email: invitation.email,
        name: parsed.data.name,
        role: invitation.role,
        passwordHash,
      });
      if (invitation.operationId)
        await transaction.insert(operationPeople).values({ operationId: invitation.operationId, personId });
      await recordAudit(
        transaction,
        { dealershipId: invitation.dealershipId, personId },
        {
          verb: 'invitation.accepted',
          thing: 'person',
          thingId: personId,
          operationId: invitation.operationId ?? undefined,
          summary: `${parsed.data.name} accepted the invitation as ${invitation.role}.`,
        },
      );
      return good({ personId });
    },
    { behavior: 'immediate' },
  );
  if (!outcome.ok) return outcome;
  return good({ cookies: await letIn(outcome.value.personId, browserToken) });
}
