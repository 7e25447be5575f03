/**
 * Expected failure is a value with words; bugs throw. A change, a reader or an import answers with an `Outcome`.
 */

/** One thing that is wrong, in words that say what to do. `path` names the input it belongs to (`facts.rowWidthInches`). */
export interface Problem {
  message: string;
  path?: string;
}

export type Outcome<Value> = { ok: true; value: Value; notes?: string[] } | { ok: false; problems: Problem[] };

/** A successful outcome, with notes where it succeeded with something to say. */
export function good<Value>(value: Value, notes?: string[]): { ok: true; value: Value; notes?: string[] } {
  return notes && notes.length > 0 ? { ok: true, value, notes } : { ok: true, value };
}

/** A failed outcome from one message or a list of problems. */
export function bad(problems: string | Problem[], path?: string): { ok: false; problems: Problem[] } {
  if (typeof problems !== 'string') return { ok: false, problems };
  return { ok: false, problems: [path === undefined ? { message: problems } : { message: problems, path }] };
}

/** The viewer may not do this, or the thing is not theirs to see. Mapped to 403/404 at the edge. */
export class NotAllowedError extends Error {
  override name = 'NotAllowedError';
}

/** A thing that does not exist, or that this viewer must not learn exists. Mapped to 404 at the edge. */
export class NotFoundError extends Error {
  override name = 'NotFoundError';
}
