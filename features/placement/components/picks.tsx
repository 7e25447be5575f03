'use client';

import { useState } from 'react';
import { formatBand, formatBushels } from '@/lib/format';
import { Button, LinkButton } from '@/lib/ui/button';
import type { Ranking, VarietyProfile } from '../engine/model';
import { holdWords } from '../view';
import { KeptBar } from './bar';
import { Ledger } from './ledger';

/** The ranked varieties with their bars; each opens its ledger in place, and up to four can be compared. */
export function Picks({
  ranking,
  stored,
  varieties,
  compareHref,
  putOnPlan,
  planCode,
}: {
  ranking: Ranking;
  /** The stored expectation by variety, for showing what a what-if changes; `null` when it is what is shown. */
  stored: Map<string, number> | null;
  varieties: VarietyProfile[];
  compareHref: string;
  /** `null` when the viewer may not change the plan. */
  putOnPlan: ((varietyId: string) => void) | null;
  planCode: string | null;
}) {
  const [open, setOpen] = useState<string | null>(ranking.picks[0]?.varietyId ?? null);
  const [chosen, setChosen] = useState<string[]>([]);
  const [shown, setShown] = useState(6);
  const traits = new Map(varieties.map((variety) => [variety.id, variety]));
  const scaleTo = Math.max(ranking.potential, ...ranking.picks.slice(0, 1).map((pick) => pick.expected));
  const toggle = (varietyId: string) =>
    setChosen((before) =>
      before.includes(varietyId) ? before.filter((one) => one !== varietyId) : [...before, varietyId].slice(-4),
    );
  const toCompare = chosen.length >= 2 ? chosen : ranking.picks.slice(0, 3).map((pick) => pick.varietyId);

  if (ranking.picks.length === 0) return <p>No variety of the line-up fits this field. The reasons stand below.</p>;
  return (
    <div>
      <ol className="border-line border-t">
        {ranking.picks.slice(0, shown).map((pick, index) => {
          const variety = traits.get(pick.varietyId);
          const difference = stored ? pick.expected - (stored.get(pick.varietyId) ?? pick.expected) : 0;
          const isOpen = open === pick.varietyId;
          return (
            <li key={pick.varietyId} className="border-line border-b py-3">
              <div className="flex gap-3">
                <span className={`w-6 shrink-0 font-display text-xl font-bold ${index === 0 ? 'text-bloom' : 'text-mute'}`}>
                  {index + 1}
                </span>
                <div className="min-w-0 grow">
                  <button
                    type="button"
                    aria-expanded={isOpen}
                    aria-controls={`ledger-${pick.varietyId}`}
                    onClick={() => setOpen(isOpen ? null : pick.varietyId)}
                    className="grid w-full grid-cols-[minmax(0,1fr)_auto] gap-x-4 text-left sm:grid-cols-[minmax(7.5rem,1fr)_minmax(0,2fr)_auto]"
                  >
                    <span>
                      <span className="font-bold text-[1.08em]">{pick.code}</span>
                      {planCode === pick.code ? (
                        <span className="ml-2 inline-block whitespace-nowrap border border-leaf bg-leaf-light px-1.5 text-[0.85em]">
                          on the plan
                        </span>
                      ) : null}
                      <span className="block text-[0.92em] text-mute">
                        RM {pick.relativeMaturity.toFixed(1)}
                        {variety?.bushType ? ` · ${variety.bushType}` : ''}
                        {variety?.height ? ` · ${variety.height}` : ''}
                      </span>
                    </span>
                    <span className="text-right sm:order-3">
                      <span className="font-display font-bold text-[1.25em]">{formatBushels(pick.expected)}</span>
                      {Math.abs(difference) >= 0.05 ? (
                        <span className={difference > 0 ? 'ml-1 text-leaf' : 'ml-1 text-rust-deep'}>
                          ({difference > 0 ? '+' : ''}
                          {formatBushels(difference)})
                        </span>
                      ) : null}
                      <span className="block text-[0.92em] text-mute whitespace-nowrap">
                        {formatBand(pick.low, pick.high)} bu/ac
                      </span>
                    </span>
                    <span className="col-span-2 mt-1.5 self-center sm:order-2 sm:col-span-1 sm:mt-0">
                      <KeptBar assessment={pick} scaleTo={scaleTo} />
                    </span>
                  </button>
                  <p className="mt-1 text-[0.92em] text-mute">{holdSentence(pick.hold, index)}</p>
                  {isOpen ? (
                    <div id={`ledger-${pick.varietyId}`} className="mt-3">
                      <Ledger assessment={pick} />
                      {pick.advice.length > 0 ? (
                        <ul className="mt-2 list-disc pl-5 text-[0.92em]">
                          {pick.advice.map((words) => (
                            <li key={words}>{words}</li>
                          ))}
                        </ul>
                      ) : null}
                      <div className="mt-3 flex flex-wrap items-center gap-3">
                        {putOnPlan && planCode !== pick.code ? (
                          <Button small kind={index === 0 ? 'action' : 'plain'} onClick={() => putOnPlan(pick.varietyId)}>
                            Put {pick.code} on the plan
                          </Button>
                        ) : null}
                        <label className="flex min-h-11 items-center gap-2 lg:min-h-8">
                          <input
                            type="checkbox"
                            className="size-5 accent-bloom lg:size-4"
                            checked={chosen.includes(pick.varietyId)}
                            onChange={() => toggle(pick.varietyId)}
                          />
                          Compare {pick.code}
                        </label>
                      </div>
                    </div>
                  ) : null}
                </div>
              </div>
            </li>
          );
        })}
      </ol>
      <div className="mt-3 flex flex-wrap gap-2">
        <LinkButton href={`${compareHref}?varieties=${toCompare.join(',')}`}>
          Compare {chosen.length >= 2 ? `the chosen ${chosen.length}` : `the first ${toCompare.length}`}
        </LinkButton>
        {ranking.picks.length > shown ? (
          <Button onClick={() => setShown(ranking.picks.length)}>Show all {ranking.picks.length} picks</Button>
        ) : null}
      </div>
    </div>
  );
}

function holdSentence(hold: number, index: number): string {
  if (index === 0) return `${capital(holdWords(hold))} draws of what is uncertain`;
  return hold >= 0.005 ? `First in ${Math.round(hold * 100)} % of draws` : 'First in almost no draw';
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
