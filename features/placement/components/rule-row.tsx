'use client';

import clsx from 'clsx';
import { useId } from 'react';
import type { Rule } from '../rules';

/** One coefficient: what it does, where its usual value comes from, and a box and a slider within its range. */
export function RuleRow({
  rule,
  standing,
  text,
  onType,
}: {
  rule: Rule;
  /** The value that counts today. */
  standing: number;
  text: string;
  onType: (text: string) => void;
}) {
  const id = useId();
  const value = Number(text.replace('−', '-').replace(',', '.'));
  const wrong = text.trim() === '' || !Number.isFinite(value) || value < rule.low || value > rule.high;
  const differs = !wrong && value !== rule.value;
  return (
    <li className={clsx('border-line border-b px-3 py-2.5', !wrong && value !== standing && 'bg-bloom-light')}>
      <div className="grid gap-x-5 gap-y-1 sm:grid-cols-[minmax(0,1fr)_13rem]">
        <div>
          <label htmlFor={id} className="font-semibold">
            {rule.words.charAt(0).toUpperCase() + rule.words.slice(1)}
          </label>
          <p>{rule.does}</p>
          <p id={`${id}-why`} className="text-[0.88em] text-mute">
            Usual {rule.value} {rule.unit}, between {rule.low} and {rule.high}. {rule.reason}
          </p>
        </div>
        <div>
          <div className="relative">
            <input
              id={id}
              inputMode="decimal"
              value={text}
              aria-invalid={wrong || undefined}
              aria-describedby={`${id}-why`}
              onChange={(event) => onType(event.target.value)}
              className="min-h-11 w-full border border-ink/40 bg-white px-3 aria-invalid:border-2 aria-invalid:border-rust lg:min-h-9"
            />
            <span className="pointer-events-none absolute inset-y-0 right-3 flex items-center text-[0.88em] text-mute">
              {rule.unit.length > 14 ? '' : rule.unit}
            </span>
          </div>
          <input
            type="range"
            aria-label={`${rule.words}, slider`}
            min={rule.low}
            max={rule.high}
            step={(rule.high - rule.low) / 100}
            value={wrong ? standing : value}
            onChange={(event) => onType(String(Number(Number(event.target.value).toPrecision(3))))}
            className="mt-1 h-8 w-full accent-bloom lg:h-5"
          />
          {wrong ? (
            <p role="alert" className="font-semibold text-rust-deep">
              Between {rule.low} and {rule.high}.
            </p>
          ) : differs ? (
            <button
              type="button"
              onClick={() => onType(String(rule.value))}
              className="text-[0.92em] underline decoration-line underline-offset-4 hover:decoration-ink"
            >
              Back to the usual {rule.value}
            </button>
          ) : null}
        </div>
      </div>
    </li>
  );
}
