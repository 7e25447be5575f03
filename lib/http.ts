import 'server-only';
import { environment } from './env';
import { NotAllowedError, NotFoundError, type Outcome } from './errors';

/**
 * What every route handler shares: where a request came from, and how an outcome becomes a status.
 * Who asks is `withViewer` in features/accounts/route.ts.
 */

/** A failure as JSON with its status. Never stored by a cache. */
export function jsonProblem(status: number, message: string): Response {
  return Response.json({ ok: false, problems: [{ message }] }, { status, headers: { 'Cache-Control': 'no-store' } });
}

/** An outcome as JSON: 200 with its value and notes, 422 with its problems. Never stored by a cache. */
export function jsonOutcome<Value>(outcome: Outcome<Value>): Response {
  return Response.json(outcome, { status: outcome.ok ? 200 : 422, headers: { 'Cache-Control': 'no-store' } });
}

/**
 * Did this request come from our own pages? A browser names the page's origin on every write, and says in
 * Sec-Fetch-Site whether it was another site's; a script that sends neither carries no victim's cookie.
 */
export function isSameOrigin(request: Request): boolean {
  const site = request.headers.get('sec-fetch-site');
  if (site === 'cross-site' || site === 'same-site') return false;
  const origin = request.headers.get('origin');
  if (origin === null) return true;
  if (origin === environment().address) return true;
  const host = request.headers.get('host') ?? new URL(request.url).host;
  try {
    return new URL(origin).host === host;
  } catch {
    return false; // 'null': a sandboxed frame or a file.
  }
}

/** The status and words of an expected error: 404 for what is missing or not theirs to see, 403 for what they may not do; `null` for a bug. */
export function jsonOfError(error: unknown): Response | null {
  if (error instanceof NotFoundError) return jsonProblem(404, error.message);
  if (error instanceof NotAllowedError) return jsonProblem(403, error.message);
  return null;
}
