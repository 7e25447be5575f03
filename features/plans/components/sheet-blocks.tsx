'use client';

import { useEffect } from 'react';
import { formatDay } from '@/lib/dates';
import { formatAcres, formatNumber, formatTenth } from '@/lib/format';
import { Button } from '@/lib/ui/button';
import type { Outline } from '../exports/outline';
import type { SheetBlock } from '../sheet';
import { MarkForm } from './mark-form';
import { useMarks } from './use-marks';

/** One block a field in type that reads in a cab. Marks are kept on the phone and sent when there is signal. */
export function SheetBlocks({ token, blocks }: { token: string; blocks: (SheetBlock & { outline: Outline })[] }) {
  const { marks, waiting, problem, add, send } = useMarks(token);

  useEffect(() => {
    if (!('serviceWorker' in navigator)) return;
    // What this page is made of is handed to the worker, so that it opens without signal next time.
    navigator.serviceWorker
      .register('/sheet/worker.js', { scope: '/sheet/' })
      .then(() => navigator.serviceWorker.ready)
      .then((registration) => {
        const parts = performance.getEntriesByType('resource').map((entry) => entry.name);
        registration.active?.postMessage({ keep: [location.href, ...parts.filter((part) => part.startsWith(location.origin))] });
      })
      .catch(() => undefined);
  }, []);

  return (
    <>
      <div role="status" aria-live="polite">
        {waiting > 0 ? (
          <div className="mt-4 flex items-center justify-between gap-3 border-l-4 border-slate bg-slate-light px-3 py-2">
            <span>
              {waiting} {waiting === 1 ? 'mark waits' : 'marks wait'} on this phone to be sent.
            </span>
            <Button onClick={send}>Send now</Button>
          </div>
        ) : null}
        {problem ? <p className="mt-3 border-l-4 border-rust bg-rust-light px-3 py-2">{problem}</p> : null}
      </div>
      <ol className="mt-5 flex flex-col gap-6">
        {blocks.map((block) => {
          const mark = marks[block.rowId];
          const plantedOn = mark?.plantedOn ?? block.plantedOn;
          return (
            <li key={block.rowId} className="border-2 border-ink bg-paper p-4">
              <div className="flex items-baseline justify-between gap-3">
                <h2 className="text-2xl">{block.name}</h2>
                <span className="font-semibold whitespace-nowrap">{formatAcres(block.areaAcres)} ac</span>
              </div>
              {block.farmName ? <p className="text-mute">{block.farmName}</p> : null}
              <p className="mt-2 font-display text-4xl font-bold">{block.code}</p>
              <p className="text-mute">
                RM {formatTenth(block.relativeMaturity)} · lot <strong className="text-ink">{block.lotNumber ?? 'any'}</strong>
                {block.treatment ? ` · ${block.treatment}` : ''}
              </p>
              <dl className="mt-3 grid grid-cols-2 gap-x-4 gap-y-2">
                <Fact label="Seeds per acre" value={formatNumber(block.seedsPerAcre)} />
                <Fact label="Seeds per foot" value={formatNumber(block.seedsPerFoot, 2)} />
                <Fact label="Rows" value={block.rowWidthInches === null ? '—' : `${block.rowWidthInches} in`} />
                <Fact
                  label="Pounds per acre"
                  value={`${block.poundsAreUsual ? 'about ' : ''}${formatNumber(block.poundsPerAcre)}`}
                />
                <Fact label="Bags to carry" value={formatNumber(block.bags)} />
                <Fact label="Units, exact" value={formatNumber(block.units, 1)} />
              </dl>
              {block.largeSeed ? <p className="mt-2 font-semibold">Large seed: mind the plates.</p> : null}
              {block.note ? <p className="mt-2">Note: {block.note}</p> : null}
              <svg viewBox="0 0 320 214" className="mt-3 w-full" role="img" aria-label={`Boundary of ${block.name}, north up`}>
                <path d={block.outline.path} fill="#e9e0f3" stroke="#221d17" strokeWidth="2" fillRule="evenodd" />
                <path d={`M8 208h${block.outline.scaleLength.toFixed(1)}`} stroke="#221d17" strokeWidth="3" />
                <text x={14 + block.outline.scaleLength} y="212" fontSize="13" fill="#221d17">
                  {formatNumber(block.outline.scaleFeet)} ft
                </text>
                <text x="300" y="18" fontSize="15" fill="#221d17">
                  N ↑
                </text>
              </svg>
              {plantedOn ? (
                <p className="mt-3 border-l-4 border-leaf bg-leaf-light px-3 py-2 font-semibold">
                  Planted {formatDay(plantedOn)}
                  {mark && !mark.sent ? ', not sent yet' : ''}
                </p>
              ) : (
                <MarkForm block={block} onMark={add} />
              )}
            </li>
          );
        })}
      </ol>
    </>
  );
}

function Fact({ label, value }: { label: string; value: string }) {
  return (
    <div>
      <dt className="text-base text-mute">{label}</dt>
      <dd className="font-display text-2xl font-bold">{value}</dd>
    </div>
  );
}
