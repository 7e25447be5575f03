'use client';

import { formatDay } from '@/lib/dates';
import { formatNumber } from '@/lib/format';
import { Button } from '@/lib/ui/button';
import type { WhatIf } from '../engine/what-if';

const ROW_WIDTHS = [7.5, 10, 15, 20, 30, 36, 38];

/** The facts a person turns over on the field page; the picks follow at once, and nothing is kept. */
export function WhatIfBox({
  season,
  assumedDate,
  facts,
  usual,
  changed,
  onChange,
  onReset,
}: {
  season: number;
  /** The day taken where none is known. */
  assumedDate: string;
  facts: Required<WhatIf>;
  /** What stands in the facts, for showing what was changed. */
  usual: Required<WhatIf>;
  changed: boolean;
  onChange: (facts: WhatIf) => void;
  onReset: () => void;
}) {
  const date = facts.plantingDate ?? assumedDate;
  const first = Date.parse(`${season}-04-10`);
  const dayNumber = Math.round((Date.parse(date) - first) / 86_400_000);
  return (
    <section
      aria-labelledby="what-if"
      className={`border px-4 py-3 ${changed ? 'border-bloom bg-bloom-light' : 'border-line bg-paper'}`}
    >
      <div className="flex flex-wrap items-center justify-between gap-2">
        <h3 id="what-if" className="text-[1.1em]">
          What if…
        </h3>
        {changed ? (
          <Button small onClick={onReset}>
            Back to the facts
          </Button>
        ) : null}
      </div>
      <p className="text-[0.92em] text-mute">
        {changed
          ? 'The picks below are for these settings. Nothing is kept.'
          : 'Move one: the picks below follow at once. Nothing is kept.'}
      </p>
      <div className="mt-2 grid gap-3 sm:grid-cols-3">
        <label className="block">
          <span className="font-semibold">
            Planted {formatDay(date)}
            {facts.plantingDate ? '' : ' (assumed)'}
            {usual.plantingDate !== facts.plantingDate && usual.plantingDate ? (
              <span className="font-normal text-mute"> was {formatDay(usual.plantingDate)}</span>
            ) : null}
          </span>
          <input
            type="range"
            min={0}
            max={91}
            value={dayNumber}
            aria-valuetext={formatDay(date)}
            aria-label="Planting date"
            onChange={(event) =>
              onChange({ plantingDate: new Date(first + Number(event.target.value) * 86_400_000).toISOString().slice(0, 10) })
            }
            className="mt-2 h-11 w-full accent-bloom lg:h-6"
          />
        </label>
        <label className="block">
          <span className="font-semibold">Row width, in</span>
          <select
            className="mt-1 min-h-11 w-full border border-ink/40 bg-white px-2 lg:min-h-9"
            value={facts.rowWidthInches ?? ''}
            onChange={(event) => onChange({ rowWidthInches: event.target.value === '' ? null : Number(event.target.value) })}
          >
            <option value="">unknown</option>
            {[...new Set([...ROW_WIDTHS, ...(usual.rowWidthInches ? [usual.rowWidthInches] : [])])]
              .sort((one, other) => one - other)
              .map((width) => (
                <option key={width} value={width}>
                  {width}
                </option>
              ))}
          </select>
        </label>
        <label className="block">
          <span className="font-semibold">
            Seeds/ac {facts.populationSeedsPerAcre ? formatNumber(facts.populationSeedsPerAcre) : '(unknown)'}
          </span>
          <input
            type="range"
            min={80_000}
            max={220_000}
            step={5000}
            value={facts.populationSeedsPerAcre ?? 140_000}
            aria-label="Seeds per acre"
            onChange={(event) => onChange({ populationSeedsPerAcre: Number(event.target.value) })}
            className="mt-2 h-11 w-full accent-bloom lg:h-6"
          />
        </label>
      </div>
    </section>
  );
}
