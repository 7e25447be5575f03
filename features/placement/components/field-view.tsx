'use client';

import clsx from 'clsx';
import { useRouter } from 'next/navigation';
import { type ReactNode, useDeferredValue, useMemo, useState, useTransition } from 'react';
import type { Field } from '@/features/fields/model';
import type { SoilMapUnit, SoilSample } from '@/features/soil/model';
import type { FieldSurface } from '@/features/soil/surface';
import type { Outcome } from '@/lib/errors';
import type { TileLayer } from '@/lib/map/style';
import { Button, LinkButton } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution, Notice, Panel } from '@/lib/ui/page';
import type { DrainageClass, FieldProfile, PlacementRules, Ranking, SeasonContext, VarietyProfile } from '../engine/model';
import { rank } from '../engine/rank';
import { siteOf } from '../engine/site';
import { type WhatIf, withFacts } from '../engine/what-if';
import type { FieldLayer } from '../view';
import { FieldMap, type Neighbour } from './field-map';
import { FixFirstBox, Questions, StoppedList } from './field-notes';
import { Picks } from './picks';
import { ScoreButton } from './score-button';
import { SeasonChart } from './season-chart';
import { WhatIfBox } from './what-if';

const TABS = [
  { key: 'picks', label: 'Picks' },
  { key: 'map', label: 'Map' },
  { key: 'season', label: 'Season line' },
] as const;
type Tab = (typeof TABS)[number]['key'];

export interface FieldViewProps {
  field: Field;
  header: ReactNode;
  profile: FieldProfile;
  season: SeasonContext;
  rules: PlacementRules;
  varieties: VarietyProfile[];
  /** The stored ranking; `null` when the field was never scored. */
  stored: Ranking | null;
  stale: boolean;
  neighbours: Neighbour[];
  surface: FieldSurface | null;
  samples: SoilSample[];
  mapUnits: SoilMapUnit[];
  statedDrainage: DrainageClass | null;
  layer: FieldLayer;
  tiles: TileLayer | null;
  planCode: string | null;
  /** `null` for people who may not change the plan. */
  putOnPlan: ((fieldId: string, varietyId: string) => Promise<Outcome<{ words: string }>>) | null;
  score: (operationId: string) => Promise<Outcome<{ fieldCount: number; pickCount: number }>>;
}

/** The field page: map with layers and season line at the left, everything about the picks in the panel at the right. */
export function FieldView(props: FieldViewProps) {
  const { field, profile, season, rules, varieties, stored, neighbours } = props;
  const router = useRouter();
  const [tab, setTab] = useState<Tab>('picks');
  const [layer, setLayer] = useState<FieldLayer>(props.layer);
  const [changes, setChanges] = useState<WhatIf>({});
  const [asking, setAsking] = useState(false);
  const [said, setSaid] = useState<Outcome<{ words: string }> | null>(null);
  const [, startTransition] = useTransition();
  const usual: Required<WhatIf> = {
    plantingDate: profile.plantingDate,
    rowWidthInches: profile.rowWidthInches,
    populationSeedsPerAcre: profile.populationSeedsPerAcre,
  };
  const changed = Object.entries(changes).some(([name, value]) => value !== usual[name as keyof WhatIf]);
  const settled = useDeferredValue(changes);

  // The same engine as on the server, in the browser: what-if needs no round trip.
  const live = useMemo(
    () => (Object.keys(settled).length > 0 || !stored ? rank(withFacts(profile, settled), varieties, season, rules) : null),
    [settled, stored, profile, varieties, season, rules],
  );
  const ranking = (changed || !stored ? live : null) ?? stored ?? live;
  const storedExpected = useMemo(
    () => (changed && stored ? new Map(stored.picks.map((pick) => [pick.varietyId, pick.expected])) : null),
    [changed, stored],
  );
  // The day the engine takes where none is known, so that chart and ledger speak of the same season.
  const assumedDate = useMemo(() => siteOf(profile, season, rules).plantingDate, [profile, season, rules]);
  const plantingDate = { ...usual, ...settled }.plantingDate ?? assumedDate;

  function chooseLayer(next: FieldLayer) {
    setLayer(next);
    window.history.replaceState(null, '', next === 'picks' ? `/fields/${field.id}` : `/fields/${field.id}?layer=${next}`);
  }

  const putOnPlan = props.putOnPlan;
  const put = putOnPlan
    ? (varietyId: string) =>
        startTransition(async () => {
          setSaid(await putOnPlan(field.id, varietyId));
          router.refresh();
        })
    : null;
  const first = ranking?.picks[0];
  const seasonChart =
    ranking && ranking.picks.length > 0 ? (
      <SeasonChart
        picks={ranking.picks.slice(0, 3)}
        season={season}
        plantingDate={plantingDate}
        isAssumed={{ ...usual, ...settled }.plantingDate === null}
        tableOpen={tab === 'season'}
      />
    ) : null;

  return (
    <main id="main" className="grid lg:h-[calc(100dvh-3.5rem)] lg:grid-cols-[minmax(0,1fr)_min(34rem,44vw)] lg:overflow-hidden">
      <nav className="sticky top-14 z-20 flex border-line border-b bg-hull lg:hidden" aria-label="Parts of the field page">
        {TABS.map((one) => (
          <button
            key={one.key}
            type="button"
            aria-current={tab === one.key}
            onClick={() => setTab(one.key)}
            className={clsx('min-h-12 grow px-2', tab === one.key ? 'border-b-4 border-b-bloom font-bold' : '')}
          >
            {one.label}
          </button>
        ))}
        <a href={`/fields/${field.id}/facts`} className="flex min-h-12 grow items-center justify-center px-2">
          Facts
        </a>
      </nav>

      <div className={clsx('relative min-h-0 min-w-0 lg:flex lg:flex-col', tab === 'picks' && 'max-lg:hidden')}>
        <FieldMap
          field={field}
          neighbours={neighbours}
          layer={layer}
          onLayer={chooseLayer}
          surface={props.surface}
          samples={props.samples}
          mapUnits={props.mapUnits}
          statedDrainage={props.statedDrainage}
          tiles={props.tiles}
          className={clsx('h-[calc(100dvh-9.6rem)] lg:block lg:h-auto lg:min-h-64 lg:grow', tab === 'map' ? 'block' : 'hidden')}
        />
        {seasonChart ? (
          <div
            className={clsx(
              'border-line border-t bg-paper px-4 py-3 lg:block lg:max-h-[48%] lg:overflow-y-auto',
              tab === 'season' ? 'block' : 'hidden',
            )}
          >
            {seasonChart}
          </div>
        ) : null}
      </div>

      <div
        className={clsx(
          'flex min-h-0 flex-col gap-5 border-line bg-paper px-4 py-5 lg:flex lg:overflow-y-auto lg:border-l lg:px-6',
          tab === 'picks' ? '' : 'hidden',
        )}
      >
        {props.header}
        {props.stale || !stored ? (
          <Notice kind="attention">
            <p className="mb-2">
              {stored
                ? 'This score is stale: facts, soil tests, the line-up or the rules changed since it was made.'
                : 'This field has no stored score yet. What you see was worked out just now in your browser.'}
            </p>
            <ScoreButton
              operationId={field.operationId}
              action={props.score}
              label={stored ? 'Score again' : 'Score the fields'}
            />
          </Notice>
        ) : null}
        {said ? (
          <Notice kind={said.ok ? 'good' : 'error'} className="sticky top-28 z-10 lg:top-0">
            {said.ok ? said.value.words : said.problems.map((problem) => problem.message).join(' ')}
          </Notice>
        ) : null}
        {ranking ? (
          <>
            <FixFirstBox fixes={ranking.fixFirst} />
            <section aria-labelledby="picks">
              <div className="mb-2 flex flex-wrap items-end justify-between gap-x-3 gap-y-1">
                <h2 id="picks" className="text-[1.25em]">
                  Picks{' '}
                  <span className="font-normal font-sans text-mute text-[0.7em]">
                    {varieties.length} in the line-up · {ranking.picks.length} fit this field
                  </span>
                </h2>
                <Button small aria-expanded={asking || changed} aria-controls="what-if-box" onClick={() => setAsking(!asking)}>
                  What if…
                </Button>
              </div>
              <div id="what-if-box" className={asking || changed ? 'mb-3' : 'hidden'}>
                <WhatIfBox
                  season={season.year}
                  assumedDate={assumedDate}
                  facts={{ ...usual, ...changes }}
                  usual={usual}
                  changed={changed}
                  onChange={(facts) => setChanges((before) => ({ ...before, ...facts }))}
                  onReset={() => setChanges({})}
                />
              </div>
              <Picks
                ranking={ranking}
                stored={storedExpected}
                varieties={varieties}
                compareHref={`/fields/${field.id}/compare`}
                planCode={props.planCode}
                putOnPlan={put}
              />
            </section>
            <Questions questions={ranking.questions} factsHref={`/fields/${field.id}/facts`} />
            <StoppedList stopped={ranking.stopped} />
          </>
        ) : null}
        {varieties.length === 0 ? (
          <Panel>
            <p>There is no published variety in the {season.year} line-up yet.</p>
          </Panel>
        ) : null}
        <Caution>
          {CAUTIONS.yield} {CAUTIONS.soil} {CAUTIONS.herbicide} {CAUTIONS.treatedSeed}
        </Caution>
        <div className="h-16 lg:hidden" />
      </div>

      <div className="no-print fixed inset-x-0 bottom-0 z-20 flex border-line border-t bg-hull lg:hidden">
        <LinkButton href={`/fields/${field.id}/compare`} kind="quiet" className="grow no-underline">
          Compare
        </LinkButton>
        <button
          type="button"
          onClick={() => {
            setTab('picks');
            setAsking(true);
            requestAnimationFrame(() => document.getElementById('picks')?.scrollIntoView());
          }}
          className="min-h-12 grow font-semibold"
        >
          What if…
        </button>
        {put && first && props.planCode !== first.code ? (
          <Button
            kind="action"
            className="grow"
            onClick={() => {
              setTab('picks');
              put(first.varietyId);
              window.scrollTo({ top: 0 });
            }}
          >
            Put {first.code} on plan
          </Button>
        ) : (
          <LinkButton href={`/plans/${field.operationId}/${season.year}`} kind="action" className="grow">
            The plan
          </LinkButton>
        )}
      </div>
    </main>
  );
}
