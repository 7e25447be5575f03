import clsx from 'clsx';
import { LinkButton } from '@/lib/ui/button';
import type { Step } from '../steps';

/** A square a step, filled when done, with the count in words: colour does not speak alone. */
export function StepMarks({ steps }: { steps: Step[] }) {
  const done = steps.filter((step) => step.done).length;
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      <span aria-hidden="true" className="inline-flex gap-[3px]">
        {steps.map((step) => (
          <span
            key={step.key}
            title={step.title}
            className={clsx('h-3.5 w-3 border', step.done ? 'border-leaf bg-leaf' : 'border-ink/40 bg-white')}
          />
        ))}
      </span>
      <span>
        {done} of {steps.length}
      </span>
    </span>
  );
}

/** Each step with what is there and the next thing to do; the one of `nextHref` stands out. */
export function StepList({ steps, nextHref }: { steps: Step[]; nextHref: string | null }) {
  const first = steps.find((step) => step.next !== null && step.next.href === nextHref);
  return (
    <ol className="border-ink border-t-2 bg-white">
      {steps.map((step, index) => (
        <li
          key={step.key}
          className={clsx(
            'grid grid-cols-[2rem_1fr] items-center gap-x-3 gap-y-2 border-line border-b px-3 py-3 sm:grid-cols-[2rem_11rem_1fr_auto]',
            step === first && 'bg-straw-light',
          )}
        >
          <span
            aria-hidden="true"
            className={clsx(
              'grid size-7 place-items-center border font-bold font-display',
              step.done ? 'border-leaf bg-leaf text-white' : 'border-ink/40 bg-white',
            )}
          >
            {step.done ? '✓' : index + 1}
          </span>
          <span className="font-semibold">
            {step.title}
            <span className="sr-only">{step.done ? ', done' : ', not done'}</span>
          </span>
          <span className="text-mute max-sm:col-start-2">{step.words}</span>
          <span className="max-sm:col-start-2">
            {step.next ? (
              <LinkButton href={step.next.href} small kind={step === first ? 'action' : 'plain'}>
                {step.next.label}
              </LinkButton>
            ) : null}
          </span>
        </li>
      ))}
    </ol>
  );
}
