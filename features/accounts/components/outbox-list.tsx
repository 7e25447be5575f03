import { formatMoment } from '@/lib/dates';
import type { FormAction } from '@/lib/ui/action-form';
import { OneButtonForm } from '@/lib/ui/one-button-form';
import { Tag } from '@/lib/ui/page';

export interface OutboxRow {
  id: string;
  to: string;
  subject: string;
  text: string;
  state: 'queued' | 'sending' | 'sent' | 'failed' | 'kept';
  attempts: number;
  lastError: string | null;
  createdAt: number;
  sentAt: number | null;
}

const KIND = { queued: 'attention', sending: 'attention', sent: 'good', failed: 'error', kept: 'plain' } as const;

/** Addresses in the plain text as links, so that a kept invitation can be followed. */
function withLinks(text: string) {
  return text.split(/(https?:\/\/\S+)/).map((part, index) =>
    /^https?:\/\//.test(part) ? (
      // biome-ignore lint/suspicious/noArrayIndexKey: the parts of one text never change their order.
      <a key={index} href={part} className="break-all text-bloom underline underline-offset-4">
        {part}
      </a>
    ) : (
      part
    ),
  );
}

/** Each mail as it was written, opened in place, with what became of it. */
export function OutboxList({ mails, sendAgain }: { mails: OutboxRow[]; sendAgain: FormAction }) {
  return (
    <ul className="border-ink border-t-2 bg-white">
      {mails.map((mail) => (
        <li key={mail.id} className="border-line border-b">
          <details>
            <summary className="grid cursor-pointer gap-x-4 gap-y-1 px-3 py-3 sm:grid-cols-[6rem_minmax(0,1fr)_auto] sm:items-baseline">
              <span>
                <Tag kind={KIND[mail.state]}>{mail.state}</Tag>
              </span>
              <span>
                <span className="font-semibold">{mail.subject}</span>
                <span className="block break-all text-mute">to {mail.to}</span>
              </span>
              <span className="text-mute">{formatMoment(mail.createdAt)}</span>
            </summary>
            <div className="border-line border-t bg-paper px-3 py-4 sm:pl-28">
              {mail.lastError ? (
                <p className="mb-3 text-rust-deep">
                  {mail.attempts} {mail.attempts === 1 ? 'attempt' : 'attempts'}. {mail.lastError}
                </p>
              ) : null}
              <div className="max-w-prose whitespace-pre-wrap">{withLinks(mail.text)}</div>
              {mail.state === 'failed' ? (
                <div className="mt-4">
                  <OneButtonForm
                    action={sendAgain}
                    label="Send again"
                    describes={`Send “${mail.subject}” again`}
                    hidden={{ mailId: mail.id }}
                  />
                </div>
              ) : null}
            </div>
          </details>
        </li>
      ))}
    </ul>
  );
}
