'use client';

import { useDeferredValue, useMemo, useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { Notice } from '@/lib/ui/page';
import type { PlacementRules, Ranking, VarietyProfile } from '../engine/model';
import { rank } from '../engine/rank';
import type { EngineInputs } from '../inputs';
import { RULE_GROUPS, type Rule } from '../rules';
import { RuleEffect } from './rule-effect';
import { RuleRow } from './rule-row';

export interface SampleField {
  id: string;
  name: string;
  engine: EngineInputs;
  varieties: VarietyProfile[];
}

const ALL_RULES = RULE_GROUPS.flatMap((group) => group.rules);

/** A typed number; `null` when it is not one or lies outside what the rule takes. */
function valueTyped(rule: Rule, text: string): number | null {
  const value = Number(text.trim().replace('−', '-').replace(',', '.'));
  return text.trim() !== '' && Number.isFinite(value) && value >= rule.low && value <= rule.high ? value : null;
}

/** The sample field's ranking with these values. */
function rankWith(sample: SampleField, overrides: PlacementRules['overrides']): Ranking {
  const { profile, season, rules } = sample.engine;
  return rank(profile, sample.varieties, season, { ...rules, overrides });
}

/** Coefficients that a manager may change, by subject, and what the values being typed do to one field, worked out as they are typed. */
export function RulesBoard({
  values,
  sample,
  save,
}: {
  /** The dealership's own values; the rest stand as usual. */
  values: Record<string, number>;
  sample: SampleField | null;
  save: (values: Record<string, number | null>) => Promise<Outcome<{ words: string }>>;
}) {
  const [typed, setTyped] = useState<Record<string, string>>({});
  const [search, setSearch] = useState('');
  const [said, setSaid] = useState<Outcome<{ words: string }> | null>(null);
  const [pending, startTransition] = useTransition();
  const standing = (rule: Rule) => values[rule.name] ?? rule.value;
  const changed = ALL_RULES.filter((rule) => {
    const text = typed[rule.name];
    return text !== undefined && valueTyped(rule, text) !== standing(rule);
  });
  const wrong = changed.filter((rule) => valueTyped(rule, typed[rule.name] as string) === null);

  const tried = useDeferredValue(typed);
  const overrides = useMemo(() => {
    const result = { ...values };
    for (const rule of ALL_RULES) {
      const text = tried[rule.name];
      const value = text === undefined ? null : valueTyped(rule, text);
      if (value !== null) result[rule.name] = value;
    }
    return result;
  }, [values, tried]);
  const standingRankings = useMemo(
    () => (sample ? { before: rankWith(sample, values), usual: rankWith(sample, {}) } : null),
    [sample, values],
  );
  const after = useMemo(() => (sample ? rankWith(sample, overrides) : null), [sample, overrides]);

  const wanted = search.trim().toLowerCase();
  const shown = (rule: Rule) => wanted === '' || `${rule.words} ${rule.does}`.toLowerCase().includes(wanted);
  const own = ALL_RULES.filter((rule) => values[rule.name] !== undefined);

  function keep() {
    startTransition(async () => {
      const outcome = await save(
        Object.fromEntries(changed.map((rule) => [rule.name, valueTyped(rule, typed[rule.name] as string)])),
      );
      setSaid(outcome);
      if (outcome.ok) setTyped({});
    });
  }

  return (
    <div className="grid gap-6 lg:grid-cols-[minmax(0,1fr)_minmax(0,25rem)]">
      <div className="max-lg:order-2">
        <div className="mb-4 flex flex-wrap items-center gap-3">
          <label className="flex items-center gap-2">
            <span className="font-semibold">Find</span>
            <input
              type="search"
              value={search}
              onChange={(event) => setSearch(event.target.value)}
              placeholder="lime, rows, freeze…"
              className="min-h-11 w-60 border border-ink/40 bg-white px-3 lg:min-h-9"
            />
          </label>
          <p className="text-mute">
            {ALL_RULES.length} values, {own.length === 0 ? 'all as usual' : `${own.length} set by this dealership`}.
          </p>
        </div>
        {RULE_GROUPS.map((group) => {
          const rules = group.rules.filter(shown);
          if (rules.length === 0) return null;
          return (
            <section key={group.title} aria-label={group.title} className="mb-6">
              <h2 className="mb-2 text-lg">{group.title}</h2>
              <ul className="border-line border-t bg-white">
                {rules.map((rule) => (
                  <RuleRow
                    key={rule.name}
                    rule={rule}
                    standing={standing(rule)}
                    text={typed[rule.name] ?? String(standing(rule))}
                    onType={(text) => setTyped((before) => ({ ...before, [rule.name]: text }))}
                  />
                ))}
              </ul>
            </section>
          );
        })}
      </div>
      <div className="max-lg:order-1">
        <div className="flex flex-col gap-4 lg:sticky lg:top-20">
          {said ? (
            <Notice kind={said.ok ? 'good' : 'error'}>
              {said.ok ? said.value.words : said.problems.map((problem) => problem.message).join(' ')}
            </Notice>
          ) : null}
          <div className={`border p-4 ${changed.length > 0 ? 'border-bloom bg-bloom-light' : 'border-line bg-paper'}`}>
            <p className="font-semibold">
              {changed.length === 0
                ? 'Change a value: the picks below follow. Nothing is kept before “Keep”.'
                : `${changed.length} ${changed.length === 1 ? 'value' : 'values'} changed, not kept yet.`}
            </p>
            {wrong.length > 0 ? (
              <p className="text-rust-deep">{wrong.map((rule) => rule.words).join(', ')}: outside the range.</p>
            ) : null}
            <div className="mt-3 flex flex-wrap gap-2">
              <Button kind="action" disabled={changed.length === 0 || wrong.length > 0} pending={pending} onClick={keep}>
                Keep
              </Button>
              <Button disabled={changed.length === 0} onClick={() => setTyped({})}>
                Back
              </Button>
              {own.length > 0 ? (
                <Button
                  kind="quiet"
                  onClick={() => setTyped(Object.fromEntries(own.map((rule) => [rule.name, String(rule.value)])))}
                >
                  All as usual
                </Button>
              ) : null}
            </div>
          </div>
          {sample && standingRankings && after ? (
            <RuleEffect field={sample} {...standingRankings} after={after} changed={changed.length > 0} />
          ) : null}
        </div>
      </div>
    </div>
  );
}
