'use client';

import type { Polygon } from 'geojson';
import { useMemo, useState } from 'react';
import type { Outcome } from '@/lib/errors';
import { Legend } from '@/lib/map/legend';
import { MapView } from '@/lib/map/map-view';
import type { TileLayer } from '@/lib/map/style';
import type { FormAction } from '@/lib/ui/action-form';
import { Button } from '@/lib/ui/button';
import { Notice } from '@/lib/ui/page';
import { boxOutline, type MaturityZone, rangeWords } from '../zones';
import { ZoneFile, type ZoneFileActions } from './zone-file';
import { NewZone } from './zone-form';
import { ZoneList } from './zone-list';

/** Early to late, light to deep: the words beside each say the range. */
const ZONE_COLOURS = ['#f1eaf8', '#e6daf2', '#dacaec', '#cebae5', '#c2aade', '#b69bd8'];

/** The colour of a zone by the middle of its range, from the earliest of the dealership's zones to the latest. */
function zoneColour(zone: Pick<MaturityZone, 'relativeMaturityFrom' | 'relativeMaturityTo'>, low: number, high: number): string {
  const middle = (zone.relativeMaturityFrom + zone.relativeMaturityTo) / 2;
  const share = high - low < 0.05 ? 0.4 : (middle - low) / (high - low);
  return ZONE_COLOURS[Math.min(ZONE_COLOURS.length - 1, Math.max(0, Math.floor(share * ZONE_COLOURS.length)))] as string;
}

export interface ZoneActions extends ZoneFileActions {
  add: (input: unknown) => Promise<Outcome<{ words: string }>>;
  change: FormAction;
  remove: FormAction;
}

/** The dealership's maturity zones: map and list side by side, and three ways to make one: draw it, say a box, or bring a file. */
export function ZoneBoard({
  zones,
  fields,
  actions,
  tiles,
}: {
  zones: MaturityZone[];
  /** Outlines of the dealership's fields, so that one sees what a zone covers. */
  fields: { id: string; geometry: MaturityZone['geometry'] }[];
  actions: ZoneActions;
  tiles: TileLayer | null;
}) {
  const [selected, setSelected] = useState<string | null>(null);
  const [drawing, setDrawing] = useState(false);
  const [outline, setOutline] = useState<Polygon | null>(null);
  const [said, setSaid] = useState<Outcome<{ words: string }> | null>(null);
  const middles = zones.map((zone) => (zone.relativeMaturityFrom + zone.relativeMaturityTo) / 2);
  const low = Math.min(...middles);
  const high = Math.max(...middles);

  const polygons = useMemo(
    () => [
      ...zones.map((zone) => ({
        id: zone.id,
        geometry: zone.geometry,
        fill: zoneColour(zone, low, high),
        fillOpacity: 0.75,
        stroke: '#5b3a86',
        label: zone.name,
        sublabel: rangeWords(zone),
      })),
      ...(outline
        ? [{ id: 'new', geometry: outline, fill: '#5b3a86', fillOpacity: 0.2, stroke: '#5b3a86', strokeWidth: 3 }]
        : []),
      ...fields.map((field) => ({
        id: field.id,
        geometry: field.geometry,
        fill: '#c08a2b',
        fillOpacity: 0.9,
        stroke: '#7a5510',
      })),
    ],
    [zones, fields, outline, low, high],
  );
  const fitTo = useMemo(() => {
    const shapes = [...zones.map((zone) => zone.geometry), ...(outline ? [outline] : [])];
    if (shapes.length > 0) return shapes;
    // No zone yet: the ground around the fields, some counties wide.
    const [longitude, latitude] = (fields[0]?.geometry.type === 'Polygon' ? fields[0].geometry.coordinates[0]?.[0] : null) ?? [
      -93.5, 42,
    ];
    const [west, south] = [(longitude as number) - 1.4, (latitude as number) - 0.8];
    return [boxOutline({ west, south, east: west + 2.8, north: south + 1.6 })];
  }, [zones, outline, fields]);

  return (
    <div className="grid gap-5 lg:grid-cols-[minmax(0,1fr)_minmax(0,28rem)]">
      <MapView
        ariaLabel="Map of the maturity zones. The list names the same zones."
        polygons={polygons}
        selectedId={selected}
        onSelect={(id) => setSelected(zones.some((zone) => zone.id === id) ? id : null)}
        onDrawn={
          drawing
            ? (shape) => {
                setOutline(shape);
                setDrawing(false);
              }
            : undefined
        }
        fitKey={`${zones.length} ${outline ? 'new' : ''}`}
        fitTo={fitTo}
        tiles={tiles}
        className="h-[55dvh] border border-line lg:sticky lg:top-20 lg:h-[calc(100dvh-17.5rem)]"
      >
        <div className="absolute top-3 left-3 flex max-w-[calc(100%-1.5rem)] flex-wrap items-start gap-2">
          <Button kind={drawing ? 'action' : 'plain'} onClick={() => setDrawing(!drawing)} aria-pressed={drawing}>
            {drawing ? 'Stop drawing' : 'Draw a zone'}
          </Button>
          {drawing ? (
            <p className="border border-line bg-paper px-3 py-2">Click each corner. Click the first one again to close it.</p>
          ) : null}
        </div>
        <div className="pointer-events-none absolute right-3 bottom-24">
          <Legend
            title="On this map"
            items={[
              { color: '#c2aade', label: 'zones, darker is later' },
              { color: '#c08a2b', label: 'fields' },
            ]}
          />
        </div>
      </MapView>
      <div className="flex flex-col gap-5">
        {said ? (
          <Notice kind={said.ok ? 'good' : 'error'}>
            {said.ok ? said.value.words : said.problems.map((problem) => problem.message).join(' ')}
          </Notice>
        ) : null}
        {outline ? (
          <NewZone
            key="drawn"
            title="The zone you drew"
            outline={outline}
            add={actions.add}
            onDone={(outcome) => {
              setSaid(outcome);
              if (outcome.ok) setOutline(null);
            }}
            onCancel={() => setOutline(null)}
          />
        ) : null}
        <ZoneList zones={zones} selected={selected} onSelect={setSelected} change={actions.change} remove={actions.remove} />
        <NewZone title="A zone between two latitudes" outline={null} add={actions.add} onDone={setSaid} />
        <ZoneFile actions={actions} onDone={setSaid} />
      </div>
    </div>
  );
}
