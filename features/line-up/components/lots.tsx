'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { formatDollars, formatNumber } from '@/lib/format';
import { Button } from '@/lib/ui/button';
import { TextField } from '@/lib/ui/form';
import { Notice, Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { LARGE_SEED_BELOW_SEEDS_PER_LB, type SeedLot } from '../model';

export interface LotActions {
  save: (input: unknown) => Promise<Outcome<unknown>>;
  archive: (input: unknown) => Promise<Outcome<null>>;
}

/** Seed lots of a variety. Growers see the seed, not the supply or the price. */
export function Lots({ varietyId, lots, actions }: { varietyId: string; lots: SeedLot[]; actions: LotActions | null }) {
  const [editing, setEditing] = useState<string | null>(null);
  return (
    <div>
      {lots.length === 0 ? (
        <p className="text-mute">No seed lot yet, so nothing is said of its supply.</p>
      ) : (
        <Table caption="Seed lots" stacked>
          <thead>
            <tr>
              <Th>Lot</Th>
              <Th numeric>Seeds/lb</Th>
              <Th numeric>Germination</Th>
              <Th>Treatment</Th>
              <Th numeric>Unit, seeds</Th>
              {actions ? <Th numeric>Units on hand</Th> : null}
              {actions ? <Th numeric>Price a unit</Th> : null}
              {actions ? <Th>Change</Th> : null}
            </tr>
          </thead>
          <tbody>
            {lots.map((lot) => (
              <tr key={lot.id}>
                <Td>
                  <b>{lot.lotNumber}</b>{' '}
                  {lot.seedsPerLb !== null && lot.seedsPerLb <= LARGE_SEED_BELOW_SEEDS_PER_LB ? (
                    <Tag kind="attention">large seed: check the plates</Tag>
                  ) : null}
                </Td>
                <Td numeric>
                  {formatNumber(lot.seedsPerLb)}
                  <span className="sm:hidden"> seeds/lb</span>
                </Td>
                <Td numeric>{lot.germinationPercent === null ? '—' : `${lot.germinationPercent} %`}</Td>
                <Td>{lot.treatment ?? 'untreated'}</Td>
                <Td numeric>{formatNumber(lot.unitSizeSeeds)}</Td>
                {actions ? (
                  <Td numeric>
                    {formatNumber(lot.unitsOnHand)}
                    <span className="sm:hidden"> units</span>
                  </Td>
                ) : null}
                {actions ? <Td numeric>{formatDollars(lot.priceCentsPerUnit, 2)}</Td> : null}
                {actions ? (
                  <Td>
                    <Button
                      small
                      onClick={() => setEditing(editing === lot.id ? null : lot.id)}
                      aria-expanded={editing === lot.id}
                    >
                      Change<span className="sr-only"> lot {lot.lotNumber}</span>
                    </Button>
                  </Td>
                ) : null}
              </tr>
            ))}
          </tbody>
        </Table>
      )}
      {actions && editing && editing !== 'new' ? (
        <LotForm
          key={editing}
          varietyId={varietyId}
          lot={lots.find((lot) => lot.id === editing) ?? null}
          actions={actions}
          onDone={() => setEditing(null)}
        />
      ) : null}
      {actions ? (
        editing === 'new' ? (
          <LotForm varietyId={varietyId} lot={null} actions={actions} onDone={() => setEditing(null)} />
        ) : (
          <Button className="mt-3" onClick={() => setEditing('new')}>
            Add a lot
          </Button>
        )
      ) : null}
    </div>
  );
}

const INPUTS = [
  { key: 'lotNumber', label: 'Lot number', unit: undefined },
  { key: 'seedsPerLb', label: 'Seeds per pound', unit: 'seeds/lb' },
  { key: 'germinationPercent', label: 'Germination', unit: '%' },
  { key: 'treatment', label: 'Treatment', unit: undefined },
  { key: 'unitSizeSeeds', label: 'Seeds in a unit', unit: 'seeds' },
  { key: 'unitsOnHand', label: 'Units on hand', unit: 'units' },
  { key: 'priceDollarsPerUnit', label: 'Price a unit', unit: '$' },
] as const;

function LotForm({
  varietyId,
  lot,
  actions,
  onDone,
}: {
  varietyId: string;
  lot: SeedLot | null;
  actions: LotActions;
  onDone: () => void;
}) {
  const router = useRouter();
  const [values, setValues] = useState<Record<string, string>>(() => ({
    lotNumber: lot?.lotNumber ?? '',
    seedsPerLb: lot?.seedsPerLb?.toString() ?? '',
    germinationPercent: lot?.germinationPercent?.toString() ?? '',
    treatment: lot?.treatment ?? '',
    unitSizeSeeds: String(lot?.unitSizeSeeds ?? 140_000),
    unitsOnHand: lot?.unitsOnHand?.toString() ?? '0',
    priceDollarsPerUnit:
      lot?.priceCentsPerUnit === null || lot?.priceCentsPerUnit === undefined ? '' : (lot.priceCentsPerUnit / 100).toFixed(2),
  }));
  const [outcome, setOutcome] = useState<Outcome<unknown> | null>(null);
  const [pending, startTransition] = useTransition();
  const problems = outcome && !outcome.ok ? outcome.problems : [];
  const run = (work: () => Promise<Outcome<unknown>>) =>
    startTransition(async () => {
      const answer = await work();
      setOutcome(answer);
      if (!answer.ok) return;
      router.refresh();
      onDone();
    });
  return (
    <form
      className="mt-4 border border-line bg-paper p-4"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        run(() => actions.save({ ...values, varietyId, ...(lot ? { lotId: lot.id, updatedAt: lot.updatedAt } : {}) }));
      }}
    >
      <h3 className="mb-3 text-lg">{lot ? `Lot ${lot.lotNumber}` : 'A new lot'}</h3>
      {problems
        .filter((problem) => !problem.path)
        .map((problem) => (
          <Notice key={problem.message} kind="error" className="mb-3">
            {problem.message}
          </Notice>
        ))}
      <div className="grid items-start gap-4 sm:grid-cols-2 lg:grid-cols-4">
        {INPUTS.map((input) => (
          <TextField
            key={input.key}
            label={input.label}
            unit={input.unit}
            value={values[input.key] ?? ''}
            error={problems.find((problem) => problem.path === input.key)?.message ?? null}
            onChange={(event) => setValues((before) => ({ ...before, [input.key]: event.target.value }))}
          />
        ))}
      </div>
      <div className="mt-4 flex flex-wrap gap-2">
        <Button type="submit" kind="action" pending={pending}>
          Keep the lot
        </Button>
        <Button onClick={onDone}>Leave it</Button>
        {lot ? (
          <Button kind="danger" pending={pending} onClick={() => run(() => actions.archive({ lotId: lot.id }))}>
            Take this lot out
          </Button>
        ) : null}
      </div>
    </form>
  );
}
