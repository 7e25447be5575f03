'use client';

import { formatMoment } from '@/lib/dates';
import { ActionForm, type ActionState, type FormAction } from '@/lib/ui/action-form';
import { TextField } from '@/lib/ui/form';
import { Notice } from '@/lib/ui/page';

export interface CrewLink {
  id: string;
  createdAt: number;
  expiresAt: number;
  revokedAt: number | null;
}

/** Links to the planting sheet: make one, see which are open, revoke one. */
export function CrewLinks({
  links,
  now,
  operationId,
  season,
  make,
  revoke,
}: {
  links: CrewLink[];
  /** The moment the page was made, milliseconds. */
  now: number;
  operationId: string;
  season: number;
  make: FormAction;
  revoke: FormAction;
}) {
  const key = { operationId, season: String(season) };
  return (
    <section aria-labelledby="crew" className="no-print">
      <h2 id="crew" className="mb-2 text-xl">
        Planting sheet for the crew
      </h2>
      <p className="mb-3 text-mute">
        A link opens the sheet on a phone without signing in, and nothing else. It is shown once: copy it when it is made.
      </p>
      <ActionForm action={withLink(make)} submit="Make a link" kind="plain" hidden={key}>
        {(answer) => (
          <>
            <TextField
              name="days"
              label="Good for"
              unit="days"
              defaultValue={String(daysToPlantingEnd(season, now))}
              inputMode="numeric"
              className="max-w-40"
            />
            {answer?.ok ? (
              <Notice kind="good" title="The link">
                <a href={answer.value.words} className="break-all underline">
                  {answer.value.words}
                </a>
              </Notice>
            ) : null}
          </>
        )}
      </ActionForm>
      {links.length > 0 ? (
        <ul className="mt-4 border-t border-line">
          {links.map((link) => {
            const open = link.revokedAt === null && link.expiresAt > now;
            return (
              <li key={link.id} className="flex flex-wrap items-center justify-between gap-2 border-b border-line py-2">
                <span>
                  Made {formatMoment(link.createdAt)},{' '}
                  {link.revokedAt !== null
                    ? `revoked ${formatMoment(link.revokedAt)}`
                    : open
                      ? `good until ${formatMoment(link.expiresAt)}`
                      : 'run out'}
                </span>
                {open ? (
                  <ActionForm action={revoke} submit="Revoke" kind="danger" hidden={{ ...key, linkId: link.id }} className="" />
                ) : null}
              </li>
            );
          })}
        </ul>
      ) : null}
    </section>
  );
}

/** Days until the end of June of the season, when the last beans are in; at least a week. */
function daysToPlantingEnd(season: number, now: number): number {
  return Math.min(400, Math.max(7, Math.ceil((Date.UTC(season, 6, 1) - now) / 86_400_000)));
}

/** The action as it is; named so that its words, which are the link, are shown as one. */
function withLink(make: FormAction): FormAction {
  return (before: ActionState, form: FormData) => make(before, form);
}
