import { formatMoment } from '@/lib/dates';
import type { FormAction } from '@/lib/ui/action-form';
import type { PlanEvent, PlanLine } from '../model';
import { CommentForm } from './comment-form';

/** How an event is said where its name is not the word for it. */
const VERBS: Record<string, string> = {
  'row set': 'set',
  'row removed': 'took off',
  comment: 'wrote',
  'crew link made': 'made a crew link',
  'crew link revoked': 'revoked a crew link',
};

/** What happened to the plan, newest first, and a place to write a comment. */
export function PlanHistory({
  events,
  lines,
  operationId,
  season,
  comment,
}: {
  events: PlanEvent[];
  lines: PlanLine[];
  operationId: string;
  season: number;
  comment: FormAction;
}) {
  const wholeFields = lines.filter((line, index) => lines.findIndex((one) => one.fieldId === line.fieldId) === index);
  return (
    <div className="grid gap-6 lg:grid-cols-[1fr_22rem]">
      <section aria-labelledby="history">
        <h2 id="history" className="mb-2 text-xl">
          History
        </h2>
        {events.length === 0 ? (
          <p className="text-mute">Nothing yet. Every change is written down here, with who and when.</p>
        ) : null}
        <ol className="border-t border-line">
          {events.map((event) => (
            <li key={event.id} className="grid gap-x-4 border-b border-line py-2 sm:grid-cols-[11rem_1fr]">
              <span className="text-mute">{formatMoment(event.at)}</span>
              <span>
                <strong>{event.personName ?? 'The crew'}</strong> {VERBS[event.verb] ?? event.verb}
                {event.fieldName ? `: ${event.fieldName}` : ''}
                {event.words.length > 0 ? <span className="text-mute"> – {event.words.join(', ')}</span> : null}
                {event.word ? <span className="mt-1 block border-l-2 border-bloom pl-3">“{event.word}”</span> : null}
              </span>
            </li>
          ))}
        </ol>
      </section>
      <section aria-labelledby="comment" className="no-print">
        <h2 id="comment" className="mb-2 text-xl">
          Comment
        </h2>
        <CommentForm
          action={comment}
          hidden={{ operationId, season: String(season) }}
          fields={wholeFields.map((line) => ({ id: line.fieldId, name: line.fieldName }))}
        />
      </section>
    </div>
  );
}
